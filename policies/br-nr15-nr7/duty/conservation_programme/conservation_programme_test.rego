package duty.conservation_programme_test

import data.duty.conservation_programme as duty
import rego.v2

programme := {"date": "2024-01-10", "ref": "document/d1", "kind": "hearing_conservation_programme", "covers": []}

site(now, documents) := {"enrolled_now": now, "documents": documents}

holds(s) := found if found := {o.holds | some o in duty.obligations} with input as s

test_programme if holds(site(2, [programme])) == {true}

test_none if holds(site(2, [object.union(programme, {"kind": "zone_signs"})])) == {false}

test_nobody if {
	holds(site(0, [])) == set()
	reasons := duty.not_owed with input as site(0, [])
	count(reasons) == 1
}
