package duty.appointment_physician_test

import data.duty.appointment_physician
import rego.v2

worker(by) := {"examinations": [
	{"ref": "examination/e1", "kind": "health_appointment", "attended_on": "2025-03-01", "by_is": by},
	{"ref": "examination/e2", "kind": "health_appointment", "attended_on": null, "by_is": null},
]}

holds(dossier) := found if found := {o.holds | some o in appointment_physician.obligations} with input as dossier

test_physician if {
	holds(worker("physician")) == {true}
	count(appointment_physician.not_owed) == 0 with input as worker("physician")
}

test_somebody_else if {
	some o in appointment_physician.obligations with input as worker("technician")
	o.holds == false
	endswith(o.note, "technician")
}

test_not_known if {
	some o in appointment_physician.obligations with input as worker(null)
	o.holds == null
	count(o.missing) == 1
}

test_no_appointment if {
	holds({"examinations": []}) == set()
	count(appointment_physician.not_owed) == 1 with input as {"examinations": []}
}
