package duty.protector_choice_test

import data.duty.protector_choice
import rego.v2

now := {"from": "2024-01-01", "to": null, "current": true}

formerly := {"from": "2020-01-01", "to": "2022-01-01", "current": false}

protection(plugs, muffs) := {"date": "2024-01-10", "ref": "protector_issue/1", "plugs_offered": plugs, "muffs_offered": muffs}

worker(spell, at_hand) := {"enrolled": [spell], "protection": at_hand}

by_key(dossier) := found if found := {o.key: o | some o in protector_choice.obligations} with input as dossier

test_numbers_are_held_against_the_parameters if {
	found := by_key(worker(now, protection(2, 1)))
	found.plugs.value == 2
	found.plugs.at_least == "plug_types"
	found.muffs.value == 1
	found.muffs.at_least == "muff_types"
	found.muffs.on == "2024-01-10"
}

test_numbers_not_recorded if {
	found := by_key(worker(now, protection(null, null)))
	found.plugs.missing == ["the number of types of earplug offered"]
	found.muffs.missing == ["the number of types of earmuff offered"]
}

test_nothing_at_hand if {
	by_key(worker(now, null)) == {}
	count(protector_choice.not_owed) == 1 with input as worker(now, null)
}

test_not_in_the_program if {
	by_key(worker(formerly, protection(2, 2))) == {}
	count(protector_choice.not_owed) == 1 with input as worker(formerly, protection(2, 2))
	count(protector_choice.not_owed) == 0 with input as worker(now, protection(2, 2))
}
