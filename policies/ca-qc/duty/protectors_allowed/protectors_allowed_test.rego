package duty.protectors_allowed_test

import data.duty.protectors_allowed
import rego.v2

group(controls, papers) := {
	"as_of": "2026-06-30", "workers": 4, "protector_holders": 3,
	"exposed": {"limit": [{"from": "2023-06-16", "to": null, "current": true}]},
	"controls": controls, "documents": papers,
}

control(feasible, installed) := {"date": "2024-03-01", "ref": "control/c", "feasible": feasible, "installed_on": installed}

paper(covers) := {"kind": "limit_exceeded", "date": "2024-04-01", "ref": "document/d", "covers": covers}

answers(dossier) := found if found := {o.by | some o in protectors_allowed.obligations} with input as dossier

test_no_case_on_record if {
	answers(group([], [])) == {null}
	answers(group([control("yes", "2024-05-01")], [])) == {null}
	answers(group([control("studied", null)], [])) == {null}
	answers(group([], [paper(["case_d"])])) == {null}
	answers(group([], [object.union(paper(["case_b"]), {"kind": "advice"})])) == {null}
	count(protectors_allowed.not_owed) == 0 with input as group([], [])
}

test_means_pending if answers(group([control("yes", null)], [])) == {{"date": "2024-03-01", "ref": "control/c"}}

test_no_means_found if answers(group([control("no", null)], [])) == {{"date": "2024-03-01", "ref": "control/c"}}

test_document_names_the_case if answers(group([control("no", null)], [paper(["case_b"])])) == {{"date": "2024-04-01", "ref": "document/d"}}

test_not_owed if {
	every changes in [{"protector_holders": 0}, {"exposed": {"limit": []}}] {
		answers(object.union(group([], []), changes)) == set()
		count(protectors_allowed.not_owed) == 1 with input as object.union(group([], []), changes)
	}
}
