package duty.listening_check_test

import data.duty.listening_check as duty
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

year(unchecked) := {
	"year": "2024", "last": "2024-11-01", "ref": "audiogram/a1", "days": 3, "unchecked_days": unchecked, "first_unchecked": null,
}

test_every_day if obligation({"registered": true, "years": [year(0)]}).holds == true

test_a_day_without if {
	found := obligation({"registered": true, "years": [year(1)]})
	found.holds == false
	found.note == "no check is on record for 1 of 3 days of use in 2024"
}

test_unknown_audiometer if obligation({"registered": false, "years": [year(3)]}).holds == null

test_not_used if quiet({"registered": true, "years": []})
