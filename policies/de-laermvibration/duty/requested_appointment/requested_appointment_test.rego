package duty.requested_appointment_test

import data.duty.requested_appointment
import rego.v2

worker(purpose, answer, attended) := {"examinations": [{
	"ref": "e1", "kind": "health_appointment", "purpose": purpose, "answer": answer,
	"offered_on": "2024-04-01", "attended_on": attended,
}]}

found(dossier) := links if links := {o.by | some o in requested_appointment.obligations} with input as dossier

test_not_held if {
	found(worker("on_request", "accepted", null)) == {null}
	some o in requested_appointment.obligations with input as worker("on_request", null, null)
	o.after == "2024-04-01"
	count(requested_appointment.not_owed) == 0 with input as worker("on_request", null, null)
}

test_no_day_at_all if {
	dossier := {"examinations": [{
		"ref": "e1", "kind": "health_appointment", "purpose": "on_request", "answer": null,
		"offered_on": null, "attended_on": null,
	}]}
	{o.holds | some o in requested_appointment.obligations} == {null} with input as dossier
}

test_held_without_an_offer if {
	dossier := {"examinations": [{
		"ref": "e1", "kind": "health_appointment", "purpose": "on_request", "answer": null,
		"offered_on": null, "attended_on": "2024-04-20",
	}]}
	found(dossier) == {{"date": "2024-04-20", "ref": "e1"}}
}

test_held if {
	some o in requested_appointment.obligations with input as worker("on_request", "accepted", "2024-04-20")
	o.by == {"date": "2024-04-20", "ref": "e1"}
	o.after == "2024-04-01"
}

test_no_wish if {
	every dossier in [{"examinations": []}, worker("periodic", "accepted", null), worker("on_request", "declined", null)] {
		found(dossier) == set()
		count(requested_appointment.not_owed) == 1 with input as dossier
	}
}
