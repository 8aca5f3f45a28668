package duty.peak_assessed_test

import data.duty.peak_assessed as duty
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

group(change) := object.union(
	{"workers": 4, "suspected_noisy": true, "impulsive": null, "exposed": {"lower": []}, "measurements": []},
	change,
)

peak := {"peak_dbc": 128, "ref": "measurement/m1", "current": true}

test_not_known_whether_impulsive if {
	duty.not_owed == set() with input as group({})
	obligation(group({})).holds == null
	obligation(group({"suspected_noisy": null, "exposed": {"lower": [now]}})).holds == null
}

test_impulsive_and_no_peak if {
	obligation(group({"impulsive": true})).holds == false
}

test_measured if {
	every impulsive in [true, false, null] {
		found := obligation(group({"impulsive": impulsive, "measurements": [{"peak_dbc": null, "ref": "measurement/m0"}, peak]}))
		found.holds == true
		found.because == ["measurement/m1"]
	}
}

test_peak_from_before_a_change if {
	obligation(group({"impulsive": true, "measurements": [object.union(peak, {"current": false})]})).holds == false
}

test_no_impulses if quiet(group({"impulsive": false}))

test_quiet_work if quiet(group({"suspected_noisy": false, "exposed": {"lower": [past]}}))
