package duty.baseline_quiet_period_test

import data.duty.baseline_quiet_period as duty
import rego.v2

worker(change) := {"baseline": object.union({"date": "2024-01-10", "ref": "audiogram/a1", "in_program": true, "quiet_hours": null, "quiet_by_protectors": null}, change)}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_hours_handed_over if {
	found := obligation(worker({"quiet_hours": 12}))
	found.value == 12
	found.at_least == "quiet_period"
	found.on == "2024-01-10"
	found.missing == []
}

test_hours_not_recorded if {
	found := obligation(worker({}))
	found.value == null
	found.missing == ["hours without noise before the baseline"]
	obligation(worker({"quiet_by_protectors": false})).value == null
}

test_protectors_are_no_substitute if obligation(worker({"quiet_by_protectors": true})).holds == false

test_hours_count_where_they_are_on_record if obligation(worker({"quiet_by_protectors": true, "quiet_hours": 14})).value == 14

test_not_owed if {
	duty.not_owed == {"there is no baseline yet"} with input as {"baseline": null}
	duty.obligations == set() with input as {"baseline": null}
	duty.not_owed == {"the worker has never been in the program"} with input as worker({"in_program": false})
	duty.obligations == set() with input as worker({"in_program": false})
	duty.not_owed == set() with input as worker({})
}
