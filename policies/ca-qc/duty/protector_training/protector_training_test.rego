package duty.protector_training_test

import data.duty.protector_training
import rego.v2

worker(training, protectors) := {
	"as_of": "2026-06-30", "protection": {"date": "2024-01-01", "ref": "protector_issue/p"},
	"exposed": {"limit": [{"from": "2023-06-16", "to": null, "current": true}]},
	"training": training, "protector_training": protectors,
}

session(topics, silent) := {"date": "2024-01-02", "ref": "training/t", "topics": topics, "topics_unrecorded": silent}

earlier := {"date": "2020-01-02", "ref": "training/t0"}

holds(dossier) := found if found := {[o.key, o.holds] | some o in protector_training.obligations} with input as dossier

test_trained if {
	holds(worker(session(["protectors", "noise_effects"], false), earlier)) == {["protectors", true], ["noise_effects", true]}
	count(protector_training.not_owed) == 0 with input as worker(null, null)
}

test_not_trained if {
	holds(worker(null, null)) == {["any", false]}
	some o in protector_training.obligations with input as worker(session(["protectors"], false), null)
	o.note == "no training on record covers noise effects"
}

test_half_trained if {
	holds(worker(session(["protectors"], false), earlier)) == {["protectors", true], ["noise_effects", false]}
	holds(worker(session(["noise_effects"], false), earlier)) == {["protectors", true], ["noise_effects", true]}
	holds(worker(session(["noise_effects"], false), null)) == {["protectors", false], ["noise_effects", true]}
}

test_topics_not_recorded if holds(worker(session([], true), null)) == {["protectors", null], ["noise_effects", null]}

test_not_owed if {
	every changes in [{"protection": null}, {"exposed": {"limit": []}}, {"as_of": "2023-06-15"}] {
		dossier := object.union(worker(null, null), changes)
		holds(dossier) == set()
		count(protector_training.not_owed) == 1 with input as dossier
	}
}
