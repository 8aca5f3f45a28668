package duty.booth_test

import data.duty.booth as duty
import rego.v2

certificate := {"date": "2024-01-10", "ref": "document/d1", "kind": "booth_certificate", "covers": ["room-1"]}

site(ever, documents) := {"enrolled_ever": ever, "documents": documents}

holds(s) := found if found := {o.holds | some o in duty.obligations} with input as s

test_certificate if {
	holds(site(2, [certificate])) == {true}
}

test_none if {
	holds(site(2, [object.union(certificate, {"kind": "zone_signs"})])) == {false}
}

test_nobody_above_the_action_level if {
	holds(site(0, [])) == set()
	reasons := duty.not_owed with input as site(0, [])
	count(reasons) == 1
}
