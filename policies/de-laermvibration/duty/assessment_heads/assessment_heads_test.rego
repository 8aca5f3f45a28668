package duty.assessment_heads_test

import data.duty.assessment_heads
import rego.v2

dossier(documents) := {"as_of": "2026-06-30", "enrolled_ever": 4, "documents": documents}

paper(heads) := {"kind": "risk_assessment", "date": "2024-05-02", "ref": "document/d1", "covers": heads}

parameter := {"values": [{"from": "2006-02-15", "value": ["one", "two"]}]}

answer(subject) := found if found := {o.holds | some o in assessment_heads.obligations} with input as subject with data.parameters.documented_heads as parameter

test_all_heads_covered if answer(dossier([paper(["two", "one", "three"])])) == {true}

test_documents_add_up if answer(dossier([paper(["two"]), paper(["one"])])) == {true}

test_a_head_lacks if {
	answer(dossier([paper(["two"])])) == {false}
	some o in assessment_heads.obligations with input as dossier([paper(["two"])]) with data.parameters.documented_heads as parameter
	endswith(o.note, ": one")
	o.facts.heads_not_covered == ["one"]
	o.missing == []
}

test_heads_not_recorded if {
	answer(dossier([paper([])])) == {null}
	some o in assessment_heads.obligations with input as dossier([paper([])]) with data.parameters.documented_heads as parameter
	count(o.missing) == 1
	contains(o.note, "does not say")
}

test_law_names_no_heads_on_that_day if {
	answer(object.union(dossier([paper(["one"])]), {"as_of": "2006-02-14"})) == {null}
}

test_no_document if {
	answer(dossier([])) == set()
	count(assessment_heads.not_owed) == 1 with input as dossier([])
	count(assessment_heads.not_owed) == 0 with input as dossier([paper([])])
}
