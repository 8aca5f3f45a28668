package duty.noise_reduced_test

import data.duty.noise_reduced as duty
import rego.v2

now := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2020-01-01", "to": "2021-01-01", "current": false}

open := {"from": "2024-01-01", "to": null, "reason": "not measured"}

obligation(dossier) := only if {
	all := duty.obligations with input as dossier
	some only in all
	count(all) == 1
}

quiet(dossier) if {
	count(duty.obligations) == 0 with input as dossier
	count(duty.not_owed) == 1 with input as dossier
}

control(what, feasible, installed) := {
	"date": "2024-02-01", "ref": sprintf("control/%s", [feasible]), "what": what, "feasible": feasible, "installed_on": installed,
}

group(spells, controls) := {"workers": 4, "exposed": {"lower": spells}, "controls": controls}

test_nothing_studied if {
	obligation(group([now], [])).of == "competent person"
	obligation(group([now], [control("hood", "studied", null)])).because == ["control/studied"]
}

test_in_place if {
	found := obligation(group([now], [control("hood", "yes", "2024-06-01")]))
	found.holds == true
	found.note == "what was found practicable is in place"
}

test_nothing_practicable if obligation(group([now], [control("hood", "no", null)])).holds == true

test_not_in_place if {
	found := obligation(group([now], [control("hood", "yes", null)]))
	found.holds == false
	found.note == "the control was found practicable and is not in place: hood"
	obligation(group([now], [control(null, "yes", null)])).note == "the control was found practicable and is not in place: the one of 2024-02-01"
}

test_a_later_record_on_the_same_control_counts if {
	obligation(group([now], [control("hood", "yes", null), control("hood", "yes", "2024-06-01")])).holds == true
	obligation(group([now], [control("hood", "yes", null), control("mat", "no", null)])).holds == false
}

test_not_exposed_now if quiet(group([past], []))
