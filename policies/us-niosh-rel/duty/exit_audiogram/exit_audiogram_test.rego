package duty.exit_audiogram_test

import data.duty.exit_audiogram as duty
import rego.v2

past := {"from": "2022-01-01", "to": "2024-07-01", "current": false}

now := {"from": "2025-01-01", "to": null, "current": true}

test(date, change) := object.union({"date": date, "ref": concat("/", ["audiogram", date]), "purpose": "exit", "invalidated": false, "quiet_hours": 14}, change)

worker(stretches, tests, examinations) := {"enrolled": stretches, "audiograms": tests, "examinations": examinations, "exposure_unknown": {"rel": []}}

by_key(w) := found if found := {o.key: o | some o in duty.obligations} with input as w

test_no_exit_test if {
	found := by_key(worker([past], [test("2024-06-30", {"purpose": "periodic"})], []))
	object.keys(found) == {"2024-07-01"}
	found["2024-07-01"].before == "2024-07-01"
	found["2024-07-01"].by == null
}

test_exit_test_with_its_quiet if {
	found := by_key(worker([past, now], [test("2024-06-30", {})], []))
	found["2024-07-01"].by == {"date": "2024-06-30", "ref": "audiogram/2024-06-30"}
	found["2024-07-01/quiet"].value == 14
	found["2024-07-01/quiet"].at_least == "quiet_period"
	found["2024-07-01/quiet"].missing == []
}

test_quiet_not_recorded if {
	found := by_key(worker([past], [test("2024-06-30", {"quiet_hours": null})], []))
	found["2024-07-01/quiet"].missing == ["hours without noise before the exit audiogram"]
}

test_outcome_only if {
	e := {"kind": "hearing_test", "purpose": "exit", "attended_on": "2024-06-20", "ref": "examination/e1"}
	found := by_key(worker([past], [], [e]))
	found == {"2024-07-01": object.union(found["2024-07-01"], {"by": {"date": "2024-06-20", "ref": "examination/e1"}})}
}

test_what_does_not_count[what] if {
	some what, w in {
		"before the stretch": worker([past], [test("2021-12-31", {})], []),
		"invalid": worker([past], [test("2024-06-30", {"invalidated": true})], []),
		"of the next stretch": worker([past, now], [test("2025-01-01", {})], []),
		"not attended": worker([past], [], [{"kind": "hearing_test", "purpose": "exit", "attended_on": null, "ref": "examination/e1"}]),
		"an appointment": worker([past], [], [{"kind": "health_appointment", "purpose": "exit", "attended_on": "2024-06-20", "ref": "examination/e1"}]),
		"another purpose": worker([past], [], [{"kind": "hearing_test", "purpose": "periodic", "attended_on": "2024-06-20", "ref": "examination/e1"}]),
	}
	by_key(w)["2024-07-01"].by == null
}

test_after_the_last_day_is_handed_over if {
	by_key(worker([past], [test("2024-07-01", {})], []))["2024-07-01"].by.date == "2024-07-01"
}

test_exposure_not_known_afterwards if {
	open := {"exposure_unknown": {"rel": [{"from": "2024-07-01", "to": null}]}}
	found := by_key(object.union(worker([past], [], []), open))
	object.keys(found) == {"2024-07-01"}
	found["2024-07-01"].holds == null
	found["2024-07-01"].missing == ["the exposure from that day on"]
	by_key(object.union(worker([past], [test("2024-06-30", {})], []), open))["2024-07-01"].by.date == "2024-06-30"
	later := {"exposure_unknown": {"rel": [{"from": "2024-07-02", "to": null}]}}
	by_key(object.union(worker([past], [], []), later))["2024-07-01"].by == null
}

test_not_owed if {
	duty.not_owed == {"the worker has never been in the program"} with input as worker([], [], [])
	duty.not_owed == {"exposure at or above the REL has not ended"} with input as worker([now], [], [])
	duty.obligations == set() with input as worker([now], [], [])
	duty.not_owed == set() with input as worker([past], [], [])
}
