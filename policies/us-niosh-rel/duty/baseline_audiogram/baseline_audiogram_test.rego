package duty.baseline_audiogram_test

import data.duty.baseline_audiogram as duty
import rego.v2

stretch := {"from": "2024-01-01", "to": null, "current": true, "baseline": null}

worker(change) := {
	"enrolled": [object.union(stretch, change)],
	"exposures": [{"from": "2024-01-01", "ref": "measurement/m1"}, {"from": "2024-01-01", "ref": null}, {"from": "2025-01-01", "ref": "measurement/m2"}],
}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_clock_starts_with_the_first_day if {
	found := obligation(worker({}))
	found.after == "2024-01-01"
	found.within == "baseline_time"
	found.by == null
	found.because == ["measurement/m1"]
	found.during == {"from": "2024-01-01", "to": null}
}

test_baseline_handed_over if {
	link := {"date": "2024-01-31", "ref": "audiogram/a1"}
	obligation(worker({"baseline": link})).by == link
}

test_not_owed if {
	duty.obligations == set() with input as {"enrolled": [], "exposures": []}
	count(duty.not_owed) == 1 with input as {"enrolled": [], "exposures": []}
	count(duty.not_owed) == 0 with input as worker({})
}
