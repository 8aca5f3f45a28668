package duty.baseline_quiet_period_test

import data.duty.baseline_quiet_period as duty
import rego.v2

worker(hours, protectors, in_program) := {"baseline": {
	"date": "2024-02-01",
	"ref": "audiogram/a1",
	"quiet_hours": hours,
	"quiet_by_protectors": protectors,
	"in_program": in_program,
}}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_hours_are_handed_over if {
	found := obligation(worker(16, null, true))
	found.value == 16
	found.at_least == "quiet_period"
	found.on == "2024-02-01"
	found.missing == []
}

test_hours_not_recorded if {
	found := obligation(worker(null, false, true))
	found.value == null
	found.missing == ["hours without workplace noise before the baseline"]
}

test_protectors_take_the_place_of_quiet if {
	found := obligation(worker(null, true, true))
	found.holds == true
	not "value" in object.keys(found)
}

test_no_baseline if {
	duty.obligations == set() with input as {"baseline": null}
	duty.not_owed == {"there is no baseline yet"} with input as {"baseline": null}
}

test_never_in_the_program if {
	duty.obligations == set() with input as worker(2, null, false)
	duty.not_owed == {"the miner has never been in the program"} with input as worker(2, null, false)
}

test_baseline_from_before_the_law_began if {
	before := {"baseline": object.union(worker(null, null, true).baseline, {"date": "2000-09-12"})}
	duty.obligations == set() with input as before
	duty.not_owed == {"the baseline is from before the law began"} with input as before
	first_day := {"baseline": object.union(worker(2, null, true).baseline, {"date": "2000-09-13"})}
	obligation(first_day).value == 2
}
