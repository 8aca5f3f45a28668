package duty.damage_others_reviewed_test

import data.duty.damage_others_reviewed as duty
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

act(kind, result, day) := {
	"date": day, "ref": sprintf("follow_up/%s", [kind]), "kind": kind, "by_is": "physician", "result": result, "ear": null,
}

worker(damage, acts) := {
	"audiograms": [],
	"examinations": [{"attended_on": "2025-02-01", "ref": "examination/e1", "damage": damage, "by_is": null, "follow_ups": acts}],
}

noise := act("damage_opinion", "work_related", "2025-03-01")

test_not_done if {
	found := obligation(worker(true, [noise]))
	found.after == "2025-03-01"
	found.by == null
	found.because == ["examination/e1", "follow_up/damage_opinion"]
	duty.not_owed == set() with input as worker(true, [noise])
}

test_done if {
	every kind in ["group_reviewed"] {
		found := obligation(worker(true, [noise, act(kind, null, "2025-04-01"), act("another", null, "2025-03-15")]))
		found.by == {"date": "2025-04-01", "ref": sprintf("follow_up/%s", [kind])}
	}
}

test_done_before_the_damage_was_found if {
	obligation(worker(true, [noise, act("group_reviewed", null, "2025-01-31")])).by == null
}

test_not_of_noise if {
	found := obligation(worker(true, [act("damage_opinion", "not_work_related", "2025-03-01")]))
	found.cite == "Control of Noise at Work Regulations reg 9(4)"
	found.because == ["examination/e1", "follow_up/damage_opinion"]
	both := worker(true, [act("damage_opinion", "not_work_related", "2025-03-01"), object.union(noise, {"ref": "follow_up/later"})])
	obligation(both).by == null
}

test_no_opinion if {
	quiet(worker(true, []))
	quiet(worker(true, [act("damage_opinion", null, "2025-03-01")]))
	quiet(worker(false, []))
}
