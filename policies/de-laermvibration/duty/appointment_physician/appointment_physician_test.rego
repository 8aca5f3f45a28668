package duty.appointment_physician_test

import data.duty.appointment_physician
import rego.v2

worker(by) := {"employed": [{"from": "2020-03-02", "to": null, "current": true}], "examinations": [
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
	holds({"examinations": [], "employed": []}) == set()
	count(appointment_physician.not_owed) == 1 with input as {"examinations": [], "employed": []}
}

test_not_of_somebody_who_has_left if {
	gone := {"employed": [{"from": "2020-03-02", "to": "2025-06-01", "current": false}]}
	every dossier in [object.union(worker("physician"), gone)] {
		count(appointment_physician.obligations) == 0 with input as dossier
		count(appointment_physician.not_owed) == 1 with input as dossier
	}
}
