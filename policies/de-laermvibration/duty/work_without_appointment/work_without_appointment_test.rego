package duty.work_without_appointment_test

import data.duty.work_without_appointment
import rego.v2

worker(current, examinations) := {
	"exposed": {
		"lower_exceeded": [{"from": "2022-01-01", "to": null, "current": true}],
		"upper_reached": [{"from": "2024-01-01", "to": null, "current": current}],
	},
	"examinations": examinations,
}

declined(day) := {"ref": "examination/e1", "kind": "health_appointment", "offered_on": day, "answer": "declined", "attended_on": null}

attended(day) := {"ref": "examination/e2", "kind": "health_appointment", "offered_on": null, "answer": null, "attended_on": day}

holds(dossier) := found if found := {o.holds | some o in work_without_appointment.obligations} with input as dossier

test_declined if {
	some o in work_without_appointment.obligations with input as worker(true, [attended("2024-03-31"), declined("2024-04-01")])
	o.holds == false
	o.because == ["examination/e1"]
	count(work_without_appointment.not_owed) == 0 with input as worker(true, [declined("2024-04-01")])
}

test_took_part_since if {
	some o in work_without_appointment.obligations with input as worker(true, [declined("2024-04-01"), attended("2024-04-01")])
	o.holds == true
	o.because == ["examination/e2"]
}

test_refusal_of_an_offered_appointment_is_none if {
	holds(worker(true, [declined("2023-12-31")])) == set()
	holds(worker(true, [declined("2021-12-31")])) == {false}
	count(work_without_appointment.not_owed) == 1 with input as worker(true, [declined("2023-12-31")])
}

test_nothing_on_record if {
	holds(worker(true, [object.union(declined("2024-04-01"), {"answer": "no_answer"})])) == set()
	count(work_without_appointment.not_owed) == 1 with input as worker(true, [])
}

test_not_exposed_now if {
	holds(worker(false, [declined("2024-04-01")])) == set()
	count(work_without_appointment.not_owed) == 1 with input as worker(false, [declined("2024-04-01")])
}
