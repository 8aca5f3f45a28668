package duty.enrolment_test

import data.duty.enrolment as duty
import rego.v2

today := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2020-01-01", "to": "2022-01-01", "current": false}

known := {
	"id": "w1", "on_roll": null, "enrolled": [today], "exposure_unknown": {"action": []},
	"exposures": [{"ref": "measurement/m1"}, {"ref": null}], "exposure_working": ["dose 75 % measured"],
}

unknown := object.union(known, {"enrolled": [], "exposure_unknown": {"action": [{"from": "2021-01-01", "to": null, "reason": "never measured"}]}})

finding(worker) := only if {
	found := duty.obligations with input as worker
	count(found) == 1
	some only in found
}

test_known if {
	finding(known).holds == true
	finding(known).because == ["measurement/m1"]
	finding(object.union(known, {"enrolled": []})).holds == true
}

test_not_known if {
	finding(unknown).holds == null
	finding(unknown).note == "it is not known whether exposure is above the action level: never measured"
	finding(unknown).facts.not_known == [{"from": "2021-01-01", "to": null}]
}

test_time_before_the_law if {
	before := {"from": "1990-01-01", "to": "1994-12-29", "reason": "no value"}
	finding(object.union(known, {"exposure_unknown": {"action": [before]}})).holds == true
	later := object.union(before, {"to": "1994-12-30"})
	finding(object.union(known, {"exposure_unknown": {"action": [later]}})).holds == null
}

test_left_out if {
	left_out := object.union(known, {"on_roll": false})
	finding(left_out).holds == false
	finding(left_out).facts.exposed_since == "2020-01-01"
	finding(object.union(left_out, {"enrolled": [past]})).holds == true
}

test_nobody_exempt if {
	count(duty.not_owed) == 0 with input as known
}
