package duty.sensitive_workers_test

import data.duty.sensitive_workers as duty
import rego.v2

paper := {"kind": "sensitive_workers", "date": "2024-01-10", "ref": "document/d1"}

site(levels, documents) := {"enrolled_now": 12, "levels_now": levels, "documents": documents}

holds(dossier) := found if found := {o.holds | some o in duty.obligations} with input as dossier

test_no_record if holds(site(["lower"], [])) == {false}

test_on_record if {
	holds(site(["lower", "lower"], [paper])) == {true}
	{o.because | some o in duty.obligations} == {["document/d1"]} with input as site(["lower", "lower"], [paper])
	duty.not_owed == set() with input as site(["lower", "lower"], [paper])
}

test_record_of_another_kind if holds(site(["lower"], [object.union(paper, {"kind": "another"})])) == {false}

test_nobody_exposed if {
	holds(site([], [])) == set()
	count(duty.not_owed) == 1 with input as site([], [])
}
