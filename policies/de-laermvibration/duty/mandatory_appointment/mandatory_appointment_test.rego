package duty.mandatory_appointment_test

import data.duty.mandatory_appointment
import rego.v2

parameter := {"values": [{"from": "2008-12-24", "value": {"months": 3}}]}

appointment(id, day, next) := {"ref": id, "kind": "health_appointment", "attended_on": day, "next_due": next}

worker(from, examinations) := {
	"exposed": {"upper_reached": [{"from": "2020-01-01", "to": "2021-01-01", "current": false}, {"from": from, "to": null, "current": true}]},
	"exposures": [{"from": from, "ref": "measurement/m1"}, {"from": from, "ref": null}],
	"examinations": examinations,
}

found(subject) := by_key if by_key := {o.key: o | some o in mandatory_appointment.obligations} with input as subject with data.parameters.first_appointment as parameter

test_nobody_was_seen if {
	o := found(worker("2024-05-01", []))
	object.keys(o) == {"first, before 2024-05-01"}
	o["first, before 2024-05-01"].within == "first_appointment"
	o["first, before 2024-05-01"].because == ["measurement/m1"]
	count(mandatory_appointment.not_owed) == 0 with input as worker("2024-05-01", [])
}

test_second_counts_from_the_start if {
	o := found(worker("2024-05-01", [appointment("e0", "2022-01-01", null), appointment("e1", "2024-04-01", "2025-01-31")]))
	object.keys(o) == {"first, before 2024-05-01", "second, after 2024-05-01"}
	second := o["second, after 2024-05-01"]
	second.after == "2024-05-01"
	second.no_later_than == "2025-01-31"
	second.by == null
	second.because == ["e1"]
}

test_later_ones_count_from_each_other if {
	seen := [appointment("e2", "2025-04-01", null), appointment("e1", "2024-04-01", null), appointment("e3", "2026-04-01", "2028-01-01")]
	o := found(worker("2024-05-01", seen))
	o["second, after 2024-05-01"].by == {"date": "2025-04-01", "ref": "e2"}
	o["after e2"].by == {"date": "2026-04-01", "ref": "e3"}
	o["after e3"].by == null
	o["after e3"].no_later_than == "2028-01-01"
	o["after e3"].within == "later_appointment"
	count(o) == 4
}

test_a_late_first_one_is_not_the_second if {
	o := found(worker("2024-05-01", [appointment("e1", "2024-06-01", null)]))
	o["second, after 2024-05-01"].by == null
}

test_other_examinations_do_not_count if {
	hearing_test := {"ref": "e1", "kind": "hearing_test", "attended_on": "2024-04-01", "next_due": null}
	offered := {"ref": "e2", "kind": "health_appointment", "attended_on": null, "next_due": null}
	object.keys(found(worker("2024-05-01", [hearing_test, offered]))) == {"first, before 2024-05-01"}
}

test_start_before_the_ordinance if {
	object.keys(found(worker("2007-05-01", []))) == {"first, since 2007-05-01"}
	o := found(worker("2007-05-01", [appointment("e1", "2023-04-01", null)]))
	object.keys(o) == {"first, since 2007-05-01", "after e1"}
	o["after e1"].by == null
}

test_not_exposed_now if {
	seen := [appointment("e1", "2020-06-01", null), appointment("e2", "2024-06-01", null)]
	gone := {"exposed": {"upper_reached": [{"from": "2020-01-01", "to": "2021-01-01", "current": false}]}, "exposures": [], "examinations": seen}
	found(gone) == {}
	count(mandatory_appointment.not_owed) == 1 with input as gone
}
