package duty.protectors_worn_test

import data.duty.protectors_worn
import rego.v2

spell := {"from": "2023-06-16", "to": null, "current": true}

worker(spells, wear) := {
	"exposed": {"limit": spells}, "wear": wear,
	"protection": {"date": "2024-01-01", "ref": "protector_issue/p"},
}

wear(worn, day) := {"date": day, "ref": "wear_check/w", "worn": worn}

holds(dossier) := found if found := {o.holds | some o in protectors_worn.obligations} with input as dossier

test_seen if {
	holds(worker([spell], wear(true, "2023-06-16"))) == {true}
	holds(worker([spell], wear(false, "2024-06-16"))) == {false}
	count(protectors_worn.not_owed) == 0 with input as worker([spell], null)
}

test_no_protector_is_another_finding if {
	without := object.union(worker([spell], null), {"protection": null})
	holds(without) == set()
	count(protectors_worn.not_owed) == 1 with input as without
	holds(object.union(without, {"wear": wear(false, "2024-06-16")})) == {false}
}

test_not_seen_since if {
	holds(worker([spell], null)) == {null}
	holds(worker([spell], wear(true, "2023-06-15"))) == {null}
	holds(worker([spell], wear(null, "2024-06-16"))) == {null}
}

test_not_owed if {
	every spells in [[], [object.union(spell, {"current": false})]] {
		holds(worker(spells, null)) == set()
		count(protectors_worn.not_owed) == 1 with input as worker(spells, null)
	}
}
