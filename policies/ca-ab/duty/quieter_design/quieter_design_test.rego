package duty.quieter_design_test

import data.duty.quieter_design
import rego.v2

change := {"id": "c1", "ref": "change/c1", "date": "2024-03-05", "what": "a new press", "raises_exposure": "yes"}

paper := {"kind": "purchase_file", "date": "2024-03-01", "ref": "document/purchase_file", "covers": ["c1"]}

group(change, papers) := {"changes": [change], "documents": papers}

answers(dossier) := found if found := {o.by | some o in quieter_design.obligations} with input as dossier

test_no_file_is_a_question if {
	answers(group(change, [])) == {null}
	{o.facts.design_limit_dba | some o in quieter_design.obligations} == {85} with input as group(change, [])
}

test_file_answers if {
	answers(group(change, [paper])) == {{"date": "2024-03-01", "ref": "document/purchase_file"}}
	count(quieter_design.not_owed) == 0 with input as group(change, [paper])
}

test_file_of_something_else_does_not if {
	answers(group(change, [object.union(paper, {"covers": ["c2"]})])) == {null}
	answers(group(change, [object.union(paper, {"kind": "advice"})])) == {null}
}

test_not_owed if {
	every changes in [{"raises_exposure": "no"}, {"date": "2009-06-30"}] {
		answers(group(object.union(change, changes), [])) == set()
		count(quieter_design.not_owed) == 1 with input as group(object.union(change, changes), [])
	}
	answers(group(object.union(change, {"raises_exposure": null}), [])) == {null}
}
