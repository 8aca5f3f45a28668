package duty.training_content_test

import data.duty.training_content as duty
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

every_head := data.parameters.training_heads.values[0].value

session(topics) := {"date": "2026-02-01", "ref": "training/t1", "topics": topics, "topics_unrecorded": count(topics) == 0}

worker(spells, training) := {"exposed": {"lower": spells, "upper": spells}, "training": training}

test_every_head if obligation(worker([now], session(every_head))).holds == true

test_every_single_head_counts if {
	every head in every_head {
		found := obligation(worker([now], session([other | some other in every_head; other != head])))
		found.holds == false
		found.note == sprintf("the training up to 2026-02-01 left out: %s", [replace(head, "_", " ")])
	}
}

between(topics) := object.union(worker([now], session(topics)), {"exposed": {"upper": [past]}})

test_collective_results_below_the_upper_values if {
	some_results := [head | some head in every_head; head != "collective_results"]
	obligation(between(some_results)).holds == null
	obligation(between([head | some head in some_results; head != "protectors"])).holds == false
	obligation(between(every_head)).holds == true
}

test_topics_not_recorded if obligation(worker([now], session([]))).missing == ["topics of the training"]

test_before_the_law if {
	obligation(worker([now], object.union(session(every_head), {"date": "2006-04-05"}))).holds == null
}

test_no_training if quiet(worker([now], null))

test_not_exposed if quiet(worker([past], session([])))
