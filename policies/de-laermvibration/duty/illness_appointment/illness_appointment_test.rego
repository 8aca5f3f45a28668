package duty.illness_appointment_test

import data.duty.illness_appointment
import rego.v2

exam(damage, follow_ups) := {
	"ref": "examination/e1", "kind": "health_appointment", "purpose": "periodic",
	"offered_on": "2025-02-01", "attended_on": "2025-03-01", "damage": damage, "follow_ups": follow_ups,
}

offered(day) := {
	"ref": sprintf("examination/%s", [day]), "kind": "health_appointment", "purpose": "illness",
	"offered_on": day, "attended_on": null, "damage": null, "follow_ups": [],
}

opinion := {"date": "2025-03-10", "ref": "follow_up/f1", "kind": "medical_opinion", "result": "work_related"}

found(examinations) := by_key if by_key := {o.key: o.by | some o in illness_appointment.obligations} with input as {"examinations": examinations}

test_nothing_offered if {
	found([exam(true, []), offered("2025-02-28")]) == {"examination/e1": null, "others of examination/e1": null}
	count(illness_appointment.not_owed) == 0 with input as {"examinations": [exam(true, [])]}
}

test_offered_and_others_looked_at if {
	review := {"date": "2025-04-01", "ref": "follow_up/f2", "kind": "group_reviewed", "result": null}
	found([exam(true, [review]), offered("2025-04-02"), offered("2025-03-01")]) == {
		"examination/e1": {"date": "2025-03-01", "ref": "examination/2025-03-01"},
		"others of examination/e1": {"date": "2025-04-01", "ref": "follow_up/f2"},
	}
}

test_known_by_an_opinion if {
	later := object.union(opinion, {"date": "2025-05-10"})
	some o in illness_appointment.obligations with input as {"examinations": [exam(null, [opinion, later])]}
	o.after == "2025-03-10"
}

test_no_illness if {
	found([exam(false, []), offered("2025-04-02")]) == {}
	count(illness_appointment.not_owed) == 1 with input as {"examinations": []}
}
