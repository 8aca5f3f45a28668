package duty.protectors_provided_test

import data.duty.protectors_provided
import rego.v2

issue := {"date": "2024-01-10", "ref": "protector_issue/P1"}

spell(current, protector) := {"from": "2024-01-10", "to": null, "current": current, "protector": protector}

worker(spells, protection) := {"enrolled": spells, "protection": protection}

test_none_offered if {
	some o in protectors_provided.obligations with input as worker([spell(true, null)], null)
	o.after == "2024-01-10"
	o.by == null
}

test_offered if {
	some o in protectors_provided.obligations with input as worker([spell(true, issue)], issue)
	o.by == issue
	count(protectors_provided.not_owed) == 0 with input as worker([spell(true, issue)], issue)
}

test_given_back if {
	some o in protectors_provided.obligations with input as worker([spell(true, issue)], null)
	o.holds == false
	o.because == ["protector_issue/P1"]
}

test_not_in_the_program_now if {
	every spells in [[], [spell(false, null)]] {
		count(protectors_provided.obligations) == 0 with input as worker(spells, null)
		count(protectors_provided.not_owed) == 1 with input as worker(spells, null)
	}
}
