package duty.initial_training_test

import data.duty.initial_training
import rego.v2

worker := {"enrolled": [
	{"from": "2018-01-01", "to": "2020-01-01", "current": false},
	{"from": "2022-03-01", "to": null, "current": true},
]}

test_each_enrolment_has_its_own_clock if {
	found := {o.key: o | some o in initial_training.obligations} with input as worker
	object.keys(found) == {"2018-01-01", "2022-03-01"}
	found["2022-03-01"].within == "training_first"
	found["2022-03-01"].by == "training.any"
	found["2018-01-01"].during == {"from": "2018-01-01", "to": "2020-01-01"}
}

test_never_exposed if {
	initial_training.obligations == set() with input as {"enrolled": []}
	count(initial_training.not_owed) == 1 with input as {"enrolled": []}
	count(initial_training.not_owed) == 0 with input as worker
}
