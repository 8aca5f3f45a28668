package duty.audiometer_calibrated_test

import data.duty.audiometer_calibrated as duty
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

test_in_use if {
	found := obligation({"tests": 3, "in_use": now})
	found.every == "audiometer_interval"
	found.during == now
	duty.not_owed == set() with input as {"tests": 3, "in_use": now}
}

test_audiometer_not_recorded if {
	unknown := {"tests": 3, "in_use": now, "registered": false, "latest_calibration": null}
	obligation(unknown).holds == null
	obligation(object.union(unknown, {"latest_calibration": {"date": "2024-01-10"}})).every == "audiometer_interval"
	obligation(object.union(unknown, {"registered": true})).every == "audiometer_interval"
}

test_not_used if {
	quiet({"tests": 0, "in_use": now})
	quiet({"tests": 3, "in_use": null})
}
