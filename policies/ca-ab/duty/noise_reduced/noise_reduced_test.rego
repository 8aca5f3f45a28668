package duty.noise_reduced_test

import data.duty.noise_reduced
import rego.v2

control(feasible, installed) := {"date": "2024-03-01", "ref": "control/c", "what": "enclosure", "feasible": feasible, "installed_on": installed}

group(controls) := {
	"workers": 4, "controls": controls,
	"exposed": {"assessment": [{"from": "2023-03-31", "to": null, "current": true}]},
}

link := {"date": "2024-03-01", "ref": "control/c"}

found(dossier) := list if list := {object.get(o, "holds", object.get(o, "by", "")) | some o in noise_reduced.obligations} with input as dossier

test_no_study_is_a_question if {
	found(group([])) == {null}
	found(group([control("studied", null)])) == {null}
	count(noise_reduced.not_owed) == 0 with input as group([])
}

test_study_answers if {
	found(group([control("no", null)])) == {link}
	found(group([control("yes", "2024-05-01")])) == {link}
}

test_practicable_and_not_in_place if {
	found(group([control("yes", null)])) == {false}
	found(group([control("yes", null), object.union(control("no", null), {"what": "rotation"})])) == {false}
}

test_later_record_on_the_same_measure if found(group([control("yes", null), control("yes", "2024-05-01")])) == {link}

test_not_above if {
	quiet := object.union(group([]), {"exposed": {"assessment": []}})
	found(quiet) == set()
	count(noise_reduced.not_owed) == 1 with input as quiet
}
