package duty.program_evaluated_test

import data.duty.program_evaluated as duty
import rego.v2

paper := {"kind": "written_program", "date": "2024-01-10", "ref": "document/1"}

other := {"kind": "advice", "date": "2023-01-10", "ref": "document/2"}

site(enrolled, papers) := {"enrolled_now": enrolled, "documents": papers}

test_every_year_from_the_first_paper if {
	found := duty.obligations with input as site(3, [other, paper])
	found == {{"every": "evaluation_interval", "during": {"from": "2024-01-10", "to": null}, "by": "document.written_program", "because": ["document/1"]}}
	duty.not_owed == set() with input as site(3, [paper])
}

test_no_paper if {
	some o in duty.obligations with input as site(3, [other])
	o.holds == false
}

test_not_owed if {
	duty.obligations == set() with input as site(0, [paper])
	count(duty.not_owed) == 1 with input as site(0, [paper])
}
