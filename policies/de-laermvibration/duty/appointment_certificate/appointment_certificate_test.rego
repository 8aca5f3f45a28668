package duty.appointment_certificate_test

import data.duty.appointment_certificate
import rego.v2

worker(certificate, next) := {"employed": [{"from": "2020-03-02", "to": null, "current": true}], "examinations": [
	{"ref": "e1", "kind": "health_appointment", "attended_on": "2025-03-01", "certificate_on": certificate, "next_due": next},
	{"ref": "e2", "kind": "health_appointment", "attended_on": null, "certificate_on": null, "next_due": null},
]}

found(dossier) := by_key if by_key := {o.key: o | some o in appointment_certificate.obligations} with input as dossier

test_no_certificate if {
	o := found(worker(null, null))
	object.keys(o) == {"e1"}
	o.e1.by == null
	o.e1.after == "2025-03-01"
	count(appointment_certificate.not_owed) == 0 with input as worker(null, null)
}

test_certificate if {
	o := found(worker("2025-03-04", "2028-03-01"))
	o.e1.by == {"date": "2025-03-04", "ref": "e1"}
	o["next date of e1"].holds == true
}

test_certificate_without_the_next_date if found(worker("2025-03-04", null))["next date of e1"].holds == null

test_no_appointment if {
	found({"examinations": [], "employed": []}) == {}
	count(appointment_certificate.not_owed) == 1 with input as {"examinations": [], "employed": []}
}

test_not_of_somebody_who_has_left if {
	gone := {"employed": [{"from": "2020-03-02", "to": "2025-06-01", "current": false}]}
	every dossier in [object.union(worker(null, null), gone)] {
		count(appointment_certificate.obligations) == 0 with input as dossier
		count(appointment_certificate.not_owed) == 1 with input as dossier
	}
}
