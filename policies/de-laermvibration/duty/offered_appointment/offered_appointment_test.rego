package duty.offered_appointment_test

import data.duty.offered_appointment
import rego.v2

parameter := {"values": [{"from": "2008-12-24", "value": {"months": 3}}]}

offer(id, day, next) := {"ref": id, "kind": "health_appointment", "offered_on": day, "attended_on": null, "next_due": next}

worker(from, upper, examinations) := {
	"exposed": {"lower_exceeded": [{"from": from, "to": null, "current": true}], "upper_reached": upper},
	"exposures": [{"from": from, "ref": "measurement/m1"}, {"from": from, "ref": null}],
	"examinations": examinations,
}

upper_until(day) := [{"from": "2024-06-01", "to": day, "current": day == null}]

found(subject) := by_key if by_key := {o.key: o | some o in offered_appointment.obligations} with input as subject with data.parameters.first_appointment as parameter

reasons(subject) := said if said := offered_appointment.not_owed with input as subject with data.parameters.first_appointment as parameter

test_nothing_offered if {
	o := found(worker("2024-05-01", [], []))
	object.keys(o) == {"first, before 2024-05-01"}
	o["first, before 2024-05-01"].by == "appointment.offered"
	o["first, before 2024-05-01"].because == ["measurement/m1"]
	count(reasons(worker("2024-05-01", [], []))) == 0
}

test_second_and_later_offers if {
	seen := [offer("e0", "2021-01-01", null), offer("e1", "2024-04-01", null), object.union(offer("e2", "2025-04-20", "2027-01-01"), {"attended_on": "2025-05-20"})]
	o := found(worker("2024-05-01", [], seen))
	o["second, after 2024-05-01"].by == {"date": "2025-04-20", "ref": "e2"}
	o["after e2"].by == null
	o["after e2"].no_later_than == "2027-01-01"
	count(o) == 3
}

test_visit_without_an_offer_counts_from_its_day if {
	visit := {"ref": "e1", "kind": "health_appointment", "offered_on": null, "attended_on": "2024-04-01", "next_due": null}
	hearing_test := {"ref": "e2", "kind": "hearing_test", "offered_on": "2024-04-01", "attended_on": null, "next_due": null}
	object.keys(found(worker("2024-05-01", [], [visit, hearing_test]))) == {"first, before 2024-05-01", "second, after 2024-05-01"}
}

test_offer_on_the_first_day_belongs_to_the_stretch if {
	o := found(worker("2024-05-01", [], [offer("e1", "2024-05-01", null)]))
	object.keys(o) == {"first, before 2024-05-01", "second, after 2024-05-01"}
	o["second, after 2024-05-01"].by == null
}

test_start_before_the_ordinance if {
	object.keys(found(worker("2007-05-01", [], []))) == {"first, since 2007-05-01"}
	object.keys(found(worker("2007-05-01", [], [offer("e1", "2024-04-01", null)]))) == {"first, since 2007-05-01", "after e1"}
}

test_mandatory_now if {
	found(worker("2024-05-01", upper_until(null), [offer("e1", "2024-04-01", null)])) == {}
	count(reasons(worker("2024-05-01", upper_until(null), []))) == 1
}

test_after_mandatory_appointments_their_series_goes_on if {
	seen := [offer("e1", "2024-04-01", null), offer("e2", "2025-04-20", null)]
	o := found(worker("2024-05-01", upper_until("2025-09-01"), seen))
	object.keys(o) == {"after e1", "after e2"}
}

test_after_mandatory_appointments_without_a_record if {
	object.keys(found(worker("2024-05-01", upper_until("2025-09-01"), []))) == {"first, since 2024-05-01"}
	count(reasons(worker("2024-05-01", upper_until("2025-09-01"), []))) == 0
}

test_upper_stretch_of_before_does_not_matter if {
	before := [{"from": "2020-06-01", "to": "2021-01-01", "current": false}]
	object.keys(found(worker("2024-05-01", before, []))) == {"first, before 2024-05-01"}
}

test_not_exposed_now if {
	gone := {"exposed": {"lower_exceeded": [{"from": "2020-01-01", "to": "2021-01-01", "current": false}], "upper_reached": []}, "exposures": [], "examinations": [offer("e1", "2024-04-01", null)]}
	found(gone) == {}
	count(reasons(gone)) == 1
}
