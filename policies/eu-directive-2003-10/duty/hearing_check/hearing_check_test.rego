package duty.hearing_check_test

import data.duty.hearing_check
import rego.v2

worker(current, tests, examinations) := {
	"audiograms": tests, "examinations": examinations,
	"exposed": {"upper_exceeded": [{"from": "2024-01-01", "to": null, "current": current}]},
}

audiogram(invalid) := {"ref": "audiogram/a1", "invalidated": invalid}

holds(dossier) := found if found := {o.holds | some o in hearing_check.obligations} with input as dossier

test_nothing_offered if {
	some o in hearing_check.obligations with input as worker(true, [audiogram(true)], [])
	o.holds == false
	o.facts.above_since == "2024-01-01"
	count(hearing_check.not_owed) == 0 with input as worker(true, [], [])
}

test_tested_or_offered if {
	holds(worker(true, [audiogram(false)], [])) == {true}
	some o in hearing_check.obligations with input as worker(true, [], [{"ref": "examination/e1"}])
	o.holds == true
	o.note == null
	o.because == ["examination/e1"]
}

test_not_above_now if {
	holds(worker(false, [], [])) == set()
	count(hearing_check.not_owed) == 1 with input as worker(false, [], [])
}
