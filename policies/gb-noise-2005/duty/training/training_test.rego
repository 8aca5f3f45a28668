package duty.training_test

import data.duty.training as duty
import rego.v2

now := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2020-01-01", "to": "2021-01-01", "current": false}

open := {"from": "2024-01-01", "to": null, "reason": "not measured"}

obligation(dossier) := only if {
	all := duty.obligations with input as dossier
	some only in all
	count(all) == 1
}

quiet(dossier) if {
	count(duty.obligations) == 0 with input as dossier
	count(duty.not_owed) == 1 with input as dossier
}

worker(spells, training) := {"exposed": {"lower": spells}, "training": training}

test_none if obligation(worker([now], null)).holds == false

test_trained if obligation(worker([now], {"date": "2024-01-10", "ref": "training/t1"})).because == ["training/t1"]

test_not_exposed if quiet(worker([past], null))
