package duty.standard_posted_test

import data.duty.standard_posted
import rego.v2

site(ever, documents) := {"enrolled_ever": ever, "enrolled_now": ever, "documents": documents}

posting := {"kind": "standard_posted", "ref": "document/standard_posted@2024-01-10"}

holds(dossier) := found if found := {o.holds | some o in standard_posted.obligations} with input as dossier

test_not_posted if {
	holds(site(40, [])) == {false}
	holds(site(40, [{"kind": "written_program", "ref": "document/wp"}])) == {false}
	count(standard_posted.not_owed) == 0 with input as site(40, [])
}

test_posted if holds(site(1, [posting])) == {true}

test_nobody_affected if {
	holds(site(0, [])) == set()
	count(standard_posted.not_owed) == 1 with input as site(0, [posting])
}
