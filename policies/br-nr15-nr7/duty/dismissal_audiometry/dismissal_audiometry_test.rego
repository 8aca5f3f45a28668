package duty.dismissal_audiometry_test

import data.duty.dismissal_audiometry as duty
import rego.v2

departure(test_age, appointment_age) := {
	"from": "2022-02-01", "last": "2025-03-31", "test_age_days": test_age, "appointment_age_days": appointment_age,
	"test_after": null, "appointment_after": null,
}

age := {"values": [{"from": "2022-01-03", "to": null, "value": 120}]}

enrolled := [{"from": "2022-02-01", "to": "2025-04-01", "current": false}]

worker(departures) := {"departures": departures, "enrolled": enrolled}

obligation(w) := o if some o in duty.obligations with input as w with data.parameters.exit_exam_age as age

reasons(w) := found if found := duty.not_owed with input as w with data.parameters.exit_exam_age as age

test_120_days_are_recent_enough if {
	obligation(worker([departure(120, null)])).holds == true
	obligation(worker([departure(0, null)])).key == "2025-03-31"
}

test_121_days_are_too_old if {
	o := obligation(worker([departure(121, null)]))
	o.after == "2025-03-31"
	o.within == "exit_clinical_time"
	o.by == null
	o.note == "the latest exam is 121 days old on the last day of the contract, which is too old"
}

test_exam_afterwards if {
	later := {"date": "2025-04-03", "ref": "audiogram/a9"}
	o := obligation(worker([object.union(departure(null, null), {"test_after": later})]))
	o.by == later
	o.note == "no exam was made before the last day of the contract"
}

test_not_above_at_the_end if {
	moved := {"departures": [departure(null, null)], "enrolled": [{"from": "2022-02-01", "to": "2025-03-31", "current": false}]}
	not obligation(moved)
	count(reasons(moved)) == 1
}

test_before_the_rule_or_still_employed if {
	old := {"departures": [object.union(departure(null, null), {"last": "2022-01-02"})], "enrolled": [{"from": "2019-02-01", "to": null}]}
	not obligation(old)
	count(reasons(old)) == 1
	count(reasons(worker([]))) == 1
}
