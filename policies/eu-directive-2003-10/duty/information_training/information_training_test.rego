package duty.information_training_test

import data.duty.information_training
import rego.v2

worker(current, training) := {
	"training": training,
	"exposed": {"lower_reached": [{"from": "2024-01-01", "to": null, "current": current}]},
}

session := {"date": "2024-01-08", "ref": "training/t1"}

holds(dossier) := found if found := {o.holds | some o in information_training.obligations} with input as dossier

test_never_trained if {
	some o in information_training.obligations with input as worker(true, null)
	o.holds == false
	o.facts.exposed_since == "2024-01-01"
	count(information_training.not_owed) == 0 with input as worker(true, null)
}

test_trained if {
	some o in information_training.obligations with input as worker(true, session)
	o.holds == true
	o.note == null
	o.because == ["training/t1"]
}

test_not_exposed_now if {
	holds(worker(false, null)) == set()
	count(information_training.not_owed) == 1 with input as worker(false, null)
}
