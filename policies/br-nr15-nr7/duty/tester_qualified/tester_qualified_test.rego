package duty.tester_qualified_test

import data.duty.tester_qualified as duty
import rego.v2

tester(change) := object.union(
	{
		"registered": true, "qualification": "audiologist", "certificate": "CRFa 0-0000", "tests": 5, "workers": 4,
		"tests_outside_validity": 0, "first_outside": null,
		"first_test": {"date": "2024-01-10", "ref": "audiogram/a1"}, "last_test": {"date": "2025-01-10", "ref": "audiogram/a2"},
	},
	change,
)

obligation(change) := o if some o in duty.obligations with input as tester(change)

test_professions if {
	every profession in ["audiologist", "physician", "otolaryngologist"] {
		obligation({"qualification": profession}).holds == true
	}
	obligation({}).because == ["audiogram/a1", "audiogram/a2"]
}

test_others if {
	every profession in ["technician", "licensed_professional"] {
		obligation({"qualification": profession}).holds == false
	}
}

test_outside_validity if obligation({"tests_outside_validity": 2}).holds == false

test_something_is_not_recorded if {
	every change in [{"registered": false, "qualification": null}, {"qualification": null}, {"certificate": null}] {
		obligation(change).holds == null
		count(obligation(change).missing) == 1
	}
}

test_no_exam if {
	not obligation({"tests": 0})
	count(duty.not_owed) == 1 with input as tester({"tests": 0})
}
