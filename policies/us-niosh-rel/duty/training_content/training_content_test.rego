package duty.training_content_test

import data.duty.training_content as duty
import rego.v2

worker(change) := object.union(
	{
		"enrolled": [{"from": "2021-01-01", "to": null, "current": true}],
		"training": {
			"date": "2026-02-01",
			"ref": "training/w1@2026-02-01",
			"topics": ["noise_effects", "protectors", "audiometry", "program_roles", "non_work_noise"],
			"topics_unrecorded": false,
		},
	},
	change,
)

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_every_topic if {
	found := obligation(worker({}))
	found.holds == true
	found.on == "2026-02-01"
}

test_topic_left_out if {
	found := obligation(worker({"training": {"topics": ["noise_effects", "site_rules"]}}))
	found.holds == false
	found.note == "the training of 2026-02-01 left out: protectors, audiometry, program roles, non work noise"
}

test_topics_not_recorded if {
	found := obligation(worker({"training": {"topics": [], "topics_unrecorded": true}}))
	found.holds == null
	found.missing == ["topics of the training"]
	obligation(worker({"training": {"topics_unrecorded": true}})).holds == true
}

test_before_the_recommendation if {
	obligation(worker({"training": {"date": "1980-01-01"}})).holds == null
}

test_no_training_yet if {
	duty.obligations == set() with input as worker({"training": null})
	duty.not_owed == {"there is no training yet"} with input as worker({"training": null})
}

test_not_in_the_program_now[what] if {
	some what, stretches in {
		"never": [],
		"no longer": [{"from": "2021-01-01", "to": "2022-01-01", "current": false}],
	}
	out := worker({"enrolled": stretches})
	duty.obligations == set() with input as out
	duty.not_owed == {"the worker is not in the program now"} with input as out
}
