package duty.training_certified_test

import data.duty.training_certified
import rego.v2

now := {"from": "2022-03-01", "to": null, "current": true}

formerly := {"from": "2018-01-01", "to": "2020-01-01", "current": false}

worker(stretch, training) := {"enrolled": [stretch], "training": training}

session(certified) := {"date": "2026-02-01", "ref": "training/w1@2026-02-01", "certified": certified}

test_certified_or_not if {
	every certified in [true, false, null] {
		some o in training_certified.obligations with input as worker(now, session(certified))
		o.holds == certified
		o.on == "2026-02-01"
	}
}

test_not_recorded if {
	some o in training_certified.obligations with input as worker(now, session(null))
	o.missing == ["whether the training was certified"]
}

test_not_owed if {
	training_certified.not_owed == {"there is no training yet"} with input as worker(now, null)
	training_certified.not_owed == {"the miner is not in the program now"} with input as worker(formerly, session(true))
	training_certified.obligations == set() with input as worker(formerly, session(true))
	count(training_certified.not_owed) == 0 with input as worker(now, session(true))
}
