package duty.repeated_training_test

import data.duty.repeated_training
import rego.v2

worker := {"enrolled": [{"from": "2022-03-01", "to": null, "current": true}]}

test_every_twelve_months if {
	expected := {{"every": "training_interval", "during": {"from": "2022-03-01", "to": null}, "by": "training.any"}}
	repeated_training.obligations == expected with input as worker
	count(repeated_training.not_owed) == 0 with input as worker
}

test_never_exposed if {
	repeated_training.obligations == set() with input as {"enrolled": []}
	count(repeated_training.not_owed) == 1 with input as {"enrolled": []}
}
