package duty.tester_qualified_test

import data.duty.tester_qualified
import rego.v2

first := {"date": "2024-03-05", "ref": "audiogram/a1"}

technician := {
	"registered": true, "qualification": "technician", "certificate": "CAOHC 1234", "competence_shown": null,
	"supervisor": "AUD-1", "supervisor_is": "audiologist", "tests": 40, "workers": 38,
	"first_test": first, "last_test": first, "tests_outside_validity": 0, "first_outside": null,
}

holds(changes) := found if found := {[o.key, o.holds] | some o in tester_qualified.obligations} with input as object.union(technician, changes)

test_certified_and_supervised if holds({}) == {["qualification", true], ["supervision", true]}

test_certificate_expired_on_the_day_of_a_test if {
	changes := {"tests_outside_validity": 3, "first_outside": {"date": "2024-06-01", "ref": "audiogram/a9"}}
	holds(changes) == {["qualification", false], ["supervision", true]}
	some o in tester_qualified.obligations with input as object.union(technician, changes)
	o.holds == false
	o.facts.tests_outside_validity == 3
	o.because[0] == "audiogram/a9"
}

test_competence_does_not_stand_in_for_the_certificate if {
	["qualification", null] in holds({"certificate": null, "competence_shown": true})
	["qualification", false] in holds({"tests_outside_validity": 3, "competence_shown": true})
	["qualification", null] in holds({"certificate": null})
}

test_responsible_to_nobody if ["supervision", false] in holds({"supervisor": null, "supervisor_is": null})

test_supervisor_not_known if ["supervision", null] in holds({"supervisor_is": null})

test_supervisor_is_no_professional if {
	["supervision", false] in holds({"supervisor_is": "technician"})
	["supervision", false] in holds({"supervisor_is": "licensed_professional"})
}

test_professionals_need_no_supervisor if {
	every profession in ["audiologist", "otolaryngologist", "physician"] {
		holds({"qualification": profession, "supervisor": null, "supervisor_is": null}) == {["qualification", true]}
		holds({"qualification": profession, "tests_outside_validity": 1}) == {["qualification", false]}
	}
}

test_other_profession if holds({"qualification": "licensed_professional"}) == {["qualification", false]}

test_not_known_who_tested if {
	holds({"registered": false, "qualification": null}) == {["qualification", null]}
	holds({"qualification": null}) == {["qualification", null]}
}

test_says_how_many_it_touches if {
	every o in tester_qualified.obligations {
		o.facts.tests == 40
		o.facts.workers == 38
	} with input as technician
}

test_has_not_tested if {
	idle := object.union(technician, {"tests": 0, "first_test": null, "last_test": null})
	count(tester_qualified.obligations) == 0 with input as idle
	count(tester_qualified.not_owed) == 1 with input as idle
	count(tester_qualified.not_owed) == 0 with input as technician
}
