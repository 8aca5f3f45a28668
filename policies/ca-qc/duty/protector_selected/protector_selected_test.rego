package duty.protector_selected_test

import data.duty.protector_selected
import rego.v2

group(sheets) := {
	"as_of": "2026-06-30", "protector_holders": 3, "documents": sheets,
	"exposed": {"limit": [{"from": "2023-06-16", "to": null, "current": true}]},
}

sheet(covers) := {"kind": "protector_selection", "date": "2024-03-01", "ref": "document/s", "covers": covers}

holds(dossier) := found if found := {o.holds | some o in protector_selected.obligations} with input as dossier

test_standard_named if {
	holds(group([sheet(["csa_z94_2"])])) == {true}
	holds(group([sheet(["en_458"])])) == {true}
	count(protector_selected.not_owed) == 0 with input as group([])
}

test_no_sheet if {
	holds(group([])) == {false}
	holds(group([sheet(["other"])])) == {false}
	holds(group([object.union(sheet(["en_458"]), {"kind": "advice"})])) == {false}
}

test_standard_not_recorded if holds(group([sheet([])])) == {null}

test_not_owed if {
	every changes in [{"protector_holders": 0}, {"exposed": {"limit": []}}] {
		holds(object.union(group([]), changes)) == set()
		count(protector_selected.not_owed) == 1 with input as object.union(group([]), changes)
	}
}
