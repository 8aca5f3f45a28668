package duty.baseline_audiogram_test

import data.duty.baseline_audiogram as duty
import rego.v2

stretch := {
	"from": "2023-08-31",
	"to": null,
	"current": true,
	"baseline": null,
	"baseline_mobile": null,
	"tested": null,
}

tested := {"baseline": {"date": "2024-02-29", "ref": "audiogram/a1"}, "baseline_mobile": false}

worker(change, van) := {
	"choices": {"mobile_test_van": van},
	"enrolled": [object.union(stretch, change)],
	"exposures": [
		{"from": "2020-01-01", "ref": "measurement/quiet"},
		{"from": "2023-08-31", "ref": "measurement/loud"},
	],
}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_no_baseline if {
	found := obligation(worker({}, false))
	found.within == "baseline_time"
	found.after == "2023-08-31"
	found.key == "2023-08-31"
	found.by == null
	found.during == {"from": "2023-08-31", "to": null}
	found.note == "exposure at or above the action level began on 2023-08-31"
	found.because == ["measurement/loud"]
}

test_baseline_on_record if {
	found := obligation(worker(tested, false))
	found.by == {"date": "2024-02-29", "ref": "audiogram/a1"}
	found.within == "baseline_time"
}

test_baseline_in_a_van_has_the_longer_time if {
	obligation(worker(object.union(tested, {"baseline_mobile": true}), false)).within == "baseline_time_mobile"
}

test_van_expected_but_not_yet_there if obligation(worker({}, true)).within == "baseline_time_mobile"

test_record_silent_at_a_site_with_a_van if {
	obligation(worker(object.union(tested, {"baseline_mobile": null}), true)).within == "baseline_time_mobile"
}

test_tested_elsewhere_at_a_site_with_a_van if obligation(worker(tested, true)).within == "baseline_time"

test_each_stretch_has_its_own_clock if {
	twice := {
		"choices": {"mobile_test_van": false},
		"enrolled": [
			object.union(stretch, {"from": "2018-01-01", "to": "2020-01-01"}),
			object.union(stretch, {"from": "2022-03-01"}),
		],
		"exposures": [],
	}
	{o.key | some o in duty.obligations} == {"2018-01-01", "2022-03-01"} with input as twice
	duty.not_owed == set() with input as twice
}

test_never_exposed if {
	quiet := {"choices": {"mobile_test_van": false}, "enrolled": [], "exposures": []}
	duty.obligations == set() with input as quiet
	duty.not_owed == {"no stretch at or above the action level is known"} with input as quiet
}
