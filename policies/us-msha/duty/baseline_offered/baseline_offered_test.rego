package duty.baseline_offered_test

import data.duty.baseline_offered
import rego.v2

worker(mobile, van) := {
	"choices": {"mobile_test_van": van},
	"enrolled": [{"from": "2023-08-31", "to": null, "current": true, "baseline": null, "baseline_mobile": mobile}],
	"exposures": [{"from": "2020-01-01", "ref": "measurement/quiet"}, {"from": "2023-08-31", "ref": "measurement/loud"}],
}

obligation(dossier) := only if {
	all := baseline_offered.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_offer_is_owed if {
	found := obligation(worker(null, false))
	found.within == "baseline_time"
	found.after == "2023-08-31"
	found.by == ["audiogram.baseline", "test.offered"]
	found.because == ["measurement/loud"]
}

test_van_gives_more_time if {
	obligation(worker(null, true)).within == "baseline_time_mobile"
	obligation(worker(true, false)).within == "baseline_time_mobile"
	obligation(worker(false, true)).within == "baseline_time"
}

test_never_exposed if {
	quiet := {"choices": {"mobile_test_van": false}, "enrolled": [], "exposures": []}
	baseline_offered.obligations == set() with input as quiet
	count(baseline_offered.not_owed) == 1 with input as quiet
	count(baseline_offered.not_owed) == 0 with input as worker(null, false)
}
