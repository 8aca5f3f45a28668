package duty.annual_audiometry_test

import data.duty.annual_audiometry as duty
import rego.v2

open(day) := {"from": day, "to": null, "current": true}

exam_of(day) := {"date": day, "invalidated": false, "ears_with_result": 2}

hired := [open("2024-03-01")]

worker(employed, enrolled, tests, examinations) := {
	"employed": employed, "enrolled": enrolled,
	"audiograms": tests, "examinations": examinations,
}

during(w) := found if found := {o.during | some o in duty.obligations} with input as w

reasons(w) := found if found := duty.not_owed with input as w

test_from_the_admission_exam_on if {
	w := worker(hired, hired, [exam_of("2024-02-01"), exam_of("2024-02-20"), exam_of("2025-02-20")], [])
	during(w) == {{"from": "2024-02-20", "to": null}}
	some o in duty.obligations with input as w
	o.every == "audiogram_interval"
	o.by == "test.done"
}

test_from_the_first_exam_on_where_it_came_late if {
	during(worker(hired, hired, [exam_of("2024-05-02"), exam_of("2025-05-02")], [])) == {{"from": "2024-05-02", "to": null}}
}

test_from_the_first_day_above_the_action_level_after_a_move if {
	during(worker([open("2020-03-01")], hired, [exam_of("2020-02-20")], [])) == {{"from": "2024-03-01", "to": null}}
}

test_exam_of_the_employment_before_does_not_count if {
	again := [{"from": "2018-01-01", "to": "2020-01-01", "current": false}, open("2024-03-01")]
	during(worker(again, hired, [exam_of("2019-12-31")], [])) == set()
	during(worker(again, hired, [exam_of("2019-12-31"), exam_of("2024-04-01")], [])) == {{"from": "2024-04-01", "to": null}}
	during(worker(again, hired, [exam_of("2020-01-01")], [])) == {{"from": "2020-01-01", "to": null}}
}

test_outcome_only if {
	examination := {"kind": "hearing_test", "attended_on": "2024-04-01"}
	others := [examination, {"kind": "hearing_test", "attended_on": null}, {"kind": "health_appointment", "attended_on": "2024-03-02"}]
	during(worker(hired, hired, [], others)) == {{"from": "2024-04-01", "to": null}}
}

test_exam_from_before_the_rule if {
	old := [open("1996-03-01")]
	during(worker(old, old, [exam_of("1996-03-01")], [])) == {{"from": "1998-04-22", "to": null}}
}

test_no_exam if {
	invalid := object.union(exam_of("2024-04-01"), {"invalidated": true})
	empty := object.union(exam_of("2024-04-01"), {"ears_with_result": 0})
	during(worker(hired, hired, [invalid, empty], [])) == set()
	reasons(worker(hired, hired, [], [])) == {"there is no exam yet, which is a finding of its own"}
}

test_stretch_that_ended_before_the_first_exam if {
	ended := [{"from": "2020-01-01", "to": "2020-06-01", "current": false}]
	during(worker([open("2020-01-01")], ended, [exam_of("2020-06-01")], [])) == set()
	during(worker([open("2020-01-01")], ended, [exam_of("2020-05-31")], [])) == {{"from": "2020-05-31", "to": "2020-06-01"}}
}

test_never_above if {
	during(worker([open("2020-01-01")], [], [exam_of("2020-06-01")], [])) == set()
	reasons(worker([], [], [], [])) == {"no stretch above the action level is known"}
}
