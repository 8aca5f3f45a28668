package duty.protectors_worn_test

import data.duty.protectors_worn as duty
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

muff := {"date": "2024-01-10", "ref": "protector_issue/w1"}

worker(spells, protection, wear) := {"exposed": {"upper": spells}, "protection": protection, "wear": wear}

seen(worn, day) := {"date": day, "ref": "wear_check/w1", "worn": worn, "own": true}

test_seen_with if obligation(worker([now], muff, seen(true, "2026-03-01"))).holds == true

test_seen_without if obligation(worker([now], muff, seen(false, "2026-03-01"))).holds == false

test_outcome_missing if obligation(worker([now], muff, seen(null, "2026-03-01"))).missing == ["the outcome of the check"]

test_never_checked if {
	obligation(worker([now], muff, null)).missing == ["a check of whether protectors are worn"]
	obligation(worker([now], muff, seen(true, "2019-12-31"))).holds == null
	obligation(worker([now], muff, seen(true, "2020-01-01"))).holds == true
}

test_none_at_hand if quiet(worker([now], null, null))

test_below if quiet(worker([past], muff, seen(false, "2026-03-01")))
