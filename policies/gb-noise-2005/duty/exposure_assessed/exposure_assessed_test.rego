package duty.exposure_assessed_test

import data.duty.exposure_assessed as duty
import rego.v2

now := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2020-01-01", "to": "2021-01-01", "current": false}

open := {"from": "2024-01-01", "to": null, "reason": "not measured"}

obligation(dossier) := only if {
	all := duty.obligations with input as dossier
	some only in all
	count(all) == 1
}

quiet(dossier) if {
	count(duty.obligations) == 0 with input as dossier
	count(duty.not_owed) == 1 with input as dossier
}

worker(change) := object.union(
	{
		"id": "w1", "on_roll": null, "exposed": {"lower": [now], "upper": [now]}, "exposure_unknown": {"lower": []},
		"exposures": [{"ref": "measurement/m1"}, {"ref": null}, {"ref": "measurement/m1"}], "exposure_working": ["LEP,d 86 dB"],
	},
	change,
)

test_known if {
	found := obligation(worker({}))
	found.holds == true
	found.because == ["measurement/m1"]
}

test_left_out_of_the_programme if {
	found := obligation(worker({"on_roll": false, "exposure_unknown": {"lower": [open]}}))
	found.holds == false
	found.because == ["worker/w1", "measurement/m1"]
	obligation(worker({"on_roll": true})).holds == true
	obligation(worker({"on_roll": false, "exposed": {"upper": [past]}})).holds == true
}

test_not_known if {
	found := obligation(worker({"exposure_unknown": {"lower": [open]}}))
	found.holds == null
	found.note == "it is not known whether exposure reaches a lower exposure action value: not measured"
	found.facts.not_known == [{"from": "2024-01-01", "to": null}]
}

test_time_before_the_law if {
	before := {"from": "2001-01-01", "to": "2006-04-06", "reason": "no value"}
	obligation(worker({"exposure_unknown": {"lower": [before]}})).holds == true
	obligation(worker({"exposure_unknown": {"lower": [object.union(before, {"to": "2006-04-07"})]}})).holds == null
}

test_nobody_exempt if count(duty.not_owed) == 0 with input as worker({})
