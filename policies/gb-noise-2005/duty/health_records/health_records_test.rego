package duty.health_records_test

import data.duty.health_records as duty
import rego.v2

paper := {"kind": "health_records", "date": "2024-01-10", "ref": "document/d1"}

site(levels, documents) := {"enrolled_now": 12, "levels_now": levels, "documents": documents}

holds(dossier) := found if found := {o.holds | some o in duty.obligations} with input as dossier

test_no_record if holds(site(["upper"], [])) == {false}

test_on_record if {
	holds(site(["lower", "upper"], [paper])) == {true}
	{o.because | some o in duty.obligations} == {["document/d1"]} with input as site(["lower", "upper"], [paper])
	duty.not_owed == set() with input as site(["lower", "upper"], [paper])
}

test_record_of_another_kind if holds(site(["upper"], [object.union(paper, {"kind": "another"})])) == {false}

test_nobody_exposed if {
	holds(site(["lower"], [])) == set()
	count(duty.not_owed) == 1 with input as site(["lower"], [])
}
