package duty.control_programme_test

import data.duty.control_programme as duty
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

paper := {"kind": "control_programme", "date": "2024-01-10", "ref": "document/p"}

group(change) := object.union(
	{
		"as_of": "2026-06-30", "workers": 4, "documents": [], "first_survey": null, "task_day": null,
		"exposed": {"upper": []}, "exposure_unknown": {"upper": []},
	},
	change,
)

test_no_programme if obligation(group({"exposed": {"upper": [now]}})).holds == false

test_programme if {
	found := obligation(group({"exposed": {"upper": [now]}, "documents": [paper, object.union(paper, {"kind": "another"})]}))
	found.holds == true
	found.because == ["document/p"]
}

test_not_known if {
	survey := {"date": "2024-01-10", "ref": "measurement/m1"}
	found := obligation(group({"exposure_unknown": {"upper": [open]}, "first_survey": survey}))
	found.holds == null
	found.note == "it is not known whether the group is at or above an upper exposure action value: not measured"
}

test_never_assessed if quiet(group({"exposure_unknown": {"upper": [open]}}))

test_below if quiet(group({"exposed": {"upper": [past]}}))
