package duty.baseline_quiet_test

import data.duty.baseline_quiet as duty
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

worker(spells, hours, protectors) := {
	"exposed": {"upper": spells},
	"baseline": {"date": "2024-02-01", "ref": "audiogram/a1", "quiet_hours": hours, "quiet_by_protectors": protectors},
}

test_hours if {
	found := obligation(worker([now], 14, false))
	found.value == 14
	found.at_least == "quiet_period"
	obligation(worker([now], null, null)).missing == ["hours without noise before the test"]
}

test_protectors if obligation(worker([now], 2, true)).holds == true

test_no_baseline if quiet({"exposed": {"upper": [now]}, "baseline": null})

test_never_exposed if quiet(worker([], 2, false))
