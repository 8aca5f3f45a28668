package duty.noise_meter_checked_test

import data.duty.noise_meter_checked as duty
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

use(before, after) := {"id": "m1", "date": "2024-02-01", "ref": "measurement/m1", "check_before_db": before, "check_after_db": after}

test_both if obligation({"noise_measurements": [use(94, 94.1)]}).holds == true

test_one_missing if {
	found := obligation({"noise_measurements": [use(94, null)]})
	found.holds == false
	found.note == "no check with a calibrator is on record after the measurement"
	obligation({"noise_measurements": [use(null, null)]}).note == "no check with a calibrator is on record before and after the measurement"
}

test_instrument_not_recorded if {
	found := obligation({"registered": false, "noise_measurements": [use(94, null)]})
	found.holds == null
	found.missing == ["which instrument was used, and its checks"]
	obligation({"registered": false, "noise_measurements": [use(94, 94)]}).holds == true
	obligation({"registered": true, "noise_measurements": [use(94, null)]}).holds == false
}

test_not_used if quiet({"noise_measurements": []})
