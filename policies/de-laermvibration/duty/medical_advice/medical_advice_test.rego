package duty.medical_advice_test

import data.duty.medical_advice
import rego.v2

worker(current, training) := {
	"training": training,
	"exposed": {"lower_exceeded": [{"from": "2024-01-01", "to": null, "current": current}]},
}

session(topics) := {"date": "2024-01-08", "ref": "training/t1", "topics": topics, "topics_unrecorded": count(topics) == 0}

holds(dossier) := found if found := {o.holds | some o in medical_advice.obligations} with input as dossier

test_not_advised if {
	holds(worker(true, null)) == {false}
	some o in medical_advice.obligations with input as worker(true, session(["protectors"]))
	o.holds == false
	contains(o.note, "no general advice")
	o.because == ["training/t1"]
}

test_advised if {
	some o in medical_advice.obligations with input as worker(true, session(["protectors", "medical_advice"]))
	o.holds == true
	o.note == null
	count(medical_advice.not_owed) == 0 with input as worker(true, session(["medical_advice"]))
}

test_topics_not_recorded if {
	some o in medical_advice.obligations with input as worker(true, session([]))
	o.holds == null
	count(o.missing) == 1
}

test_not_above_now if {
	holds(worker(false, null)) == set()
	count(medical_advice.not_owed) == 1 with input as worker(false, null)
}
