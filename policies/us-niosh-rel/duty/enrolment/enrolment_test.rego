package duty.enrolment_test

import data.duty.enrolment as duty
import rego.v2

today := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2020-01-01", "to": "2022-01-01", "current": false}

known := {
	"id": "w1",
	"on_roll": null,
	"enrolled": [today],
	"exposure_unknown": {"rel": []},
	"exposures": [{"ref": "measurement/m1"}, {"ref": null}, {"ref": "measurement/m1"}],
	"exposure_working": ["from 2020-01-01 on; measurement/m1", "dose 75 % measured"],
}

unknown := object.union(known, {
	"enrolled": [],
	"exposure_unknown": {"rel": [{"from": "2021-01-01", "to": null, "reason": "the group was never measured"}]},
})

the_finding(worker) := finding if {
	findings := duty.obligations with input as worker
	some finding in findings
	count(findings) == 1
}

test_exposure_is_known if {
	finding := the_finding(known)
	finding.holds == true
	finding.because == ["measurement/m1"]
}

test_working_is_shown if {
	every worker in [known, unknown, object.union(known, {"on_roll": false})] {
		the_finding(worker).facts.working == ["from 2020-01-01 on; measurement/m1", "dose 75 % measured"]
	}
}

test_exposure_is_known_and_low if the_finding(object.union(known, {"enrolled": []})).holds == true

test_nothing_is_known_of_the_group if {
	finding := the_finding(unknown)
	finding.holds == null
	finding.missing == ["an exposure that can be held against the REL"]
	finding.note == "it is not known whether exposure reaches the REL: the group was never measured"
	finding.facts.not_known == [{"from": "2021-01-01", "to": null}]
}

test_left_out_of_the_program if {
	finding := the_finding(object.union(known, {"on_roll": false}))
	finding.holds == false
	finding.because == ["worker/w1", "measurement/m1"]
	finding.facts.exposed_since == "2020-01-01"
	finding.note == "exposure is at or above the REL, but the employer's roll leaves the worker out of the program"
}

test_left_out_counts_more_than_an_unknown_stretch if {
	the_finding(object.union(unknown, {"on_roll": false, "enrolled": [today]})).holds == false
}

test_rightly_off_the_roll_since_exposure_ended if {
	the_finding(object.union(known, {"on_roll": false, "enrolled": [past]})).holds == true
}

test_nobody_exempt if {
	count(duty.not_owed) == 0 with input as known
	count(duty.not_owed) == 0 with input as unknown
}
