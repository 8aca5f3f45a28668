package duty.preventive_audiometry_test

import data.duty.preventive_audiometry
import rego.v2

worker(current, upper, tests, examinations) := {
	"audiograms": tests, "examinations": examinations,
	"exposed": {
		"lower_exceeded": [{"from": "2024-01-01", "to": null, "current": current}],
		"upper_exceeded": [{"from": "2024-01-01", "to": null, "current": upper}],
	},
}

answer(dossier) := found if found := {o.by | some o in preventive_audiometry.obligations} with input as dossier

reasons(dossier) := found if found := preventive_audiometry.not_owed with input as dossier

examination := {"ref": "examination/e1", "offered_on": "2024-03-01", "attended_on": "2024-04-01"}

test_nobody_has_judged if {
	answer(worker(true, false, [{"date": "2024-01-01", "ref": "audiogram/a0", "invalidated": true}], [])) == {null}
	count(reasons(worker(true, false, [], []))) == 0
}

test_offered if {
	answer(worker(true, false, [], [examination])) == {{"date": "2024-03-01", "ref": "examination/e1"}}
	answer(worker(true, false, [{"date": "2024-02-01", "ref": "audiogram/a1", "invalidated": false}], [examination])) == {{"date": "2024-02-01", "ref": "audiogram/a1"}}
}

test_above_the_upper_values if {
	answer(worker(true, true, [], [])) == set()
	count(reasons(worker(true, true, [], []))) == 1
}

test_not_above_now if {
	answer(worker(false, false, [], [])) == set()
	count(reasons(worker(false, false, [], []))) == 1
}
