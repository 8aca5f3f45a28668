package duty.health_record_kept_test

import data.duty.health_record_kept as duty
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

lost := {"id": "a9", "date": "2020-02-01", "ref": "follow_up/f1"}

audiogram := {"ref": "audiogram/a1"}

test_lost if {
	found := obligation({"missing_audiograms": [lost], "audiograms": [audiogram]})
	found.holds == false
	found.for == "health_record_retention"
	found.on == "2020-02-01"
}

test_on_file if obligation({"missing_audiograms": [], "audiograms": [audiogram]}).holds == true

test_no_audiogram if quiet({"missing_audiograms": [], "audiograms": []})
