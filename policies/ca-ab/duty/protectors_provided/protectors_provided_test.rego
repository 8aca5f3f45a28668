package duty.protectors_provided_test

import data.duty.protectors_provided
import rego.v2

spell := {"from": "2023-03-31", "to": null, "current": true}

unknown := [{"from": "2023-03-31", "to": null, "reason": "not measured"}]

worker(spells, open, protection) := {
	"as_of": "2026-06-30", "exposed": {"protectors": spells}, "exposure_unknown": {"protectors": open},
	"protection": protection, "results": [{"ref": "measurement/m1"}], "exposure_working": [],
}

protector := {"date": "2023-07-01", "ref": "protector_issue/p"}

holds(dossier) := found if found := {o.holds | some o in protectors_provided.obligations} with input as dossier

test_without_protector if {
	holds(worker([spell], [], null)) == {false}
	count(protectors_provided.not_owed) == 0 with input as worker([spell], [], null)
}

test_with_protector if {
	some o in protectors_provided.obligations with input as worker([spell], [], protector)
	o.holds == true
	o.note == null
	o.because == ["protector_issue/p", "measurement/m1"]
}

test_not_known if {
	holds(worker([], unknown, null)) == {null}
	holds(worker([spell], unknown, protector)) == {true}
	count(protectors_provided.not_owed) == 0 with input as worker([], unknown, null)
}

test_not_owed if {
	every dossier in [worker([], [], null), worker([object.union(spell, {"current": false, "to": "2024-01-01"})], [], null)] {
		holds(dossier) == set()
		count(protectors_provided.not_owed) == 1 with input as dossier
	}
}
