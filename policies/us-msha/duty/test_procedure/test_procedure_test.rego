package duty.test_procedure_test

import data.duty.test_procedure
import rego.v2

paper := {"kind": "test_procedure", "date": "2024-01-10", "ref": "document/1", "covers": []}

other := {"kind": "advice", "date": "2024-01-10", "ref": "document/2", "covers": []}

site(papers) := {"enrolled_ever": 12, "documents": papers}

holds(dossier) := found if found := {o.holds | some o in test_procedure.obligations} with input as dossier

test_on_record if {
	holds(site([other, paper])) == {true}
	some o in test_procedure.obligations with input as site([other, paper])
	o.because == ["document/1"]
	o.on == "2024-01-10"
}

test_missing if {
	holds(site([other])) == {false}
	count(test_procedure.not_owed) == 0 with input as site([other])
}

test_not_owed if {
	quiet := {"enrolled_ever": 0, "documents": [paper]}
	holds(quiet) == set()
	count(test_procedure.not_owed) == 1 with input as quiet
}
