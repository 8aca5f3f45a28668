package duty.risk_assessment_test

import data.duty.risk_assessment as duty
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

paper := {"kind": "risk_assessment", "date": "2024-01-10", "ref": "document/ra"}

group(change) := object.union(
	{
		"as_of": "2026-06-30", "workers": 4, "suspected_noisy": null, "documents": [],
		"exposed": {"lower": []}, "exposure_unknown": {"lower": []},
	},
	change,
)

loud := group({"exposed": {"lower": [now]}})

test_noisy_and_not_assessed if obligation(loud).holds == false

suspected := group({"suspected_noisy": true, "exposure_unknown": {"lower": [open]}})

test_suspected_and_not_assessed if obligation(suspected).holds == false

test_noise_not_known if obligation(group({"exposure_unknown": {"lower": [open]}})).holds == null

test_assessed if {
	every g in [loud, suspected, group({"exposure_unknown": {"lower": [open]}})] {
		found := obligation(object.union(g, {"documents": [paper]}))
		found.holds == true
		found.because == ["document/ra"]
		found.note == "the latest risk assessment is of 2024-01-10"
	}
}

test_another_paper if obligation(object.union(loud, {"documents": [object.union(paper, {"kind": "another"})]})).holds == false

test_quiet_work if {
	quiet(group({"suspected_noisy": false, "exposure_unknown": {"lower": [open]}}))
	quiet(group({"exposed": {"lower": [past]}}))
	quiet(group({"suspected_noisy": true}))
}
