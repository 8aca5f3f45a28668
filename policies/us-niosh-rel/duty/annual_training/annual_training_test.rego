package duty.annual_training_test

import data.duty.annual_training as duty
import rego.v2

stretch := {"from": "2021-01-01", "to": null, "current": true, "tested": null}

test_every_stretch_at_the_rel if {
	found := duty.obligations with input as {"enrolled": [stretch]}
	found == {{"every": "training_interval", "during": {"from": "2021-01-01", "to": null}, "by": "training.any"}}
	duty.not_owed == set() with input as {"enrolled": [stretch]}
}

test_the_end_is_handed_over if {
	ended := object.union(stretch, {"to": "2022-01-01", "current": false})
	found := duty.obligations with input as {"enrolled": [ended, stretch]}
	{o.during.to | some o in found} == {"2022-01-01", null}
}

test_not_owed if {
	duty.obligations == set() with input as {"enrolled": []}
	duty.not_owed == {"no stretch at or above the REL is known"} with input as {"enrolled": []}
}
