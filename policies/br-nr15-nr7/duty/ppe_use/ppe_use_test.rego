package duty.ppe_use_test

import data.duty.ppe_use as duty
import rego.v2

since(day) := {"from": day, "to": null, "current": true}

formerly := {"from": "2020-01-01", "to": "2024-01-01", "current": false}

held := {
	"date": "2024-01-10", "ref": "protector_issue/P1", "protector": "P1", "certificate": "12345",
	"certified_to": "2027-01-31",
}

base := {
	"as_of": "2026-06-30", "exposed": {"limit": [since("2024-01-01")]}, "exposure_unknown": {"limit": []},
	"enrolled": [since("2024-01-01")], "protection": held, "wear": null, "training": null, "protector_training": null,
}

worker(change) := object.union(base, change)

obligation(change) := o if some o in duty.obligations with input as worker(change)

reasons(change) := found if found := duty.not_owed with input as worker(change)

not_above := {"exposed": {"limit": [formerly]}}

open := {"exposed": {"limit": []}, "exposure_unknown": {"limit": [{"from": "2024-01-01", "to": null, "reason": "not measured"}]}}

check(worn, day) := {"wear": {"date": day, "ref": "wear_check/w1", "worn": worn, "own": true}}

test_seen if {
	obligation(check(true, "2024-01-01")).holds == true
	obligation(check(false, "2026-05-05")).holds == false
	obligation(check(false, "2026-05-05")).note == "the worker was seen without a protector"
	obligation(check(null, "2026-05-05")).missing == ["the outcome of the check"]
}

test_not_checked if {
	obligation({}).holds == null
	obligation(check(true, "2023-12-31")).holds == null
	reasons({}) == set()
}

test_no_protector if {
	not obligation({"protection": null})
	count(reasons({"protection": null})) == 1
	seen := object.union({"protection": null}, check(false, "2026-05-05"))
	obligation(seen).holds == false
	reasons(seen) == set()
}

test_not_known_to_be_above if {
	every change in [not_above, open] {
		not obligation(change)
		count(reasons(change)) == 1
	}
}
