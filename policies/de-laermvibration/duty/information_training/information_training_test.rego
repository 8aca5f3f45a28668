package duty.information_training_test

import data.duty.information_training
import rego.v2

worker(current) := {
	"exposed": {"lower_reached": [{"from": "2024-01-01", "to": null, "current": current}]},
	"exposures": [{"from": "2024-01-01", "ref": "measurement/m1"}, {"from": "2024-01-01", "ref": null}, {"from": "2025-01-01", "ref": "measurement/m2"}],
}

test_before_the_start if {
	some o in information_training.obligations with input as worker(true)
	o.before == "2024-01-01"
	o.by == "training.any"
	o.because == ["measurement/m1"]
	count(information_training.not_owed) == 0 with input as worker(true)
}

test_not_exposed_now if {
	found := information_training.obligations with input as worker(false)
	count(found) == 0
	count(information_training.not_owed) == 1 with input as worker(false)
}
