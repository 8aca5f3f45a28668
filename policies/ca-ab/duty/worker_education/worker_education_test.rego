package duty.worker_education_test

import data.duty.worker_education
import rego.v2

worker(training) := {
	"as_of": "2026-06-30", "training": training,
	"enrolled": [{"from": "2020-01-01", "to": null, "current": true}],
}

session(topics, silent) := {"date": "2024-01-02", "ref": "training/t", "topics": topics, "topics_unrecorded": silent}

holds(dossier) := found if found := {[o.key, o.holds] | some o in worker_education.obligations} with input as dossier

test_educated if {
	holds(worker(session(["noise_effects", "noise_controls", "protectors"], false))) == {["noise_effects", true], ["noise_controls", true], ["protectors", true]}
	count(worker_education.not_owed) == 0 with input as worker(null)
}

test_lacking if {
	holds(worker(null)) == {["training", false]}
	holds(worker(session(["protectors"], false))) == {["noise_effects", false], ["noise_controls", false], ["protectors", true]}
	some o in worker_education.obligations with input as worker(session(["protectors"], false))
	o.note == "no training on record covers noise controls"
}

test_topics_not_recorded if {
	holds(worker(session([], true))) == {["topics", null]}
	holds(worker(session(["protectors"], true))) == {["topics", null], ["protectors", true]}
	holds(worker(session(["noise_effects", "noise_controls", "protectors"], true))) == {["noise_effects", true], ["noise_controls", true], ["protectors", true]}
}

test_not_owed if {
	every spells in [[], [{"from": "2020-01-01", "to": "2021-01-01", "current": false}]] {
		dossier := object.union(worker(null), {"enrolled": spells})
		holds(dossier) == set()
		count(worker_education.not_owed) == 1 with input as dossier
	}
}
