package duty.ppe_training_test

import data.duty.ppe_training as duty
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

session := {"date": "2024-01-10", "ref": "training/t1", "topics_unrecorded": true}

test_trained if {
	obligation({"protector_training": session, "training": session}).holds == true
	obligation({"protector_training": session}).because == ["training/t1", "protector_issue/P1"]
}

test_not_trained if {
	obligation({}).holds == false
	obligation({"training": object.union(session, {"topics_unrecorded": false})}).holds == false
}

test_topics_not_recorded if obligation({"training": session}).holds == null

test_no_protector if {
	not obligation({"protection": null})
	count(reasons({"protection": null})) == 1
	reasons(object.union(not_above, open)) == set()
}
