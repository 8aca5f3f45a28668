package duty.protector_choice_test

import data.duty.protector_choice
import rego.v2

protection(choices) := {"date": "2024-01-10", "ref": "protector_issue/P1", "protector": "P1", "choices_offered": choices}

worker(current, protector) := {"enrolled": [{"from": "2024-01-01", "to": null, "current": current}], "protection": protector}

obligation(dossier) := o if some o in protector_choice.obligations with input as dossier

reasons(dossier) := found if found := protector_choice.not_owed with input as dossier

test_number_is_held_against_the_variety if {
	obligation(worker(true, protection(1))).value == 1
	obligation(worker(true, protection(1))).at_least == "protector_variety"
	obligation(worker(true, protection(1))).missing == []
	count(reasons(worker(true, protection(1)))) == 0
}

test_number_not_recorded if {
	obligation(worker(true, protection(null))).value == null
	obligation(worker(true, protection(null))).missing == ["the number of models offered"]
}

test_not_in_the_program_now if {
	not obligation(worker(false, protection(1)))
	count(reasons(worker(false, protection(1)))) == 1
	count(reasons({"enrolled": [], "protection": null})) == 1
}

test_no_protector if {
	not obligation(worker(true, null))
	count(reasons(worker(true, null))) == 1
}
