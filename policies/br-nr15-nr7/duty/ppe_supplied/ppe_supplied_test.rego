package duty.ppe_supplied_test

import data.duty.ppe_supplied as duty
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

test_supplied if {
	obligation({}).holds == true
	reasons({}) == set()
}

test_not_supplied if {
	obligation({"protection": null}).holds == false
	obligation({"protection": null}).facts.above_the_limit_since == "2024-01-01"
}

test_limit_not_known if {
	obligation(object.union(open, {"protection": null})).holds == null
	obligation(open).holds == true
	nobody := object.union(open, {"enrolled": []})
	not obligation(nobody)
	count(reasons(nobody)) == 1
}

test_not_above if {
	not obligation(object.union(not_above, {"protection": null}))
	count(reasons(not_above)) == 1
}
