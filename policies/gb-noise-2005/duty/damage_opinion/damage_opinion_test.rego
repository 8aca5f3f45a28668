package duty.damage_opinion_test

import data.duty.damage_opinion as duty
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

opinion(result, by) := {"date": "2025-03-01", "ref": "follow_up/o", "kind": "damage_opinion", "by_is": by, "result": result, "ear": null}

worker(damage, acts) := {
	"audiograms": [],
	"examinations": [{"attended_on": "2025-02-01", "ref": "examination/e1", "damage": damage, "by_is": null, "follow_ups": acts}],
}

test_nobody_was_asked if {
	obligation(worker(true, [])).of == "doctor"
	obligation(worker(true, [opinion("work_related", "technician")])).of == "doctor"
}

test_answered if {
	every result in ["work_related", "not_work_related"] {
		found := obligation(worker(true, [opinion(result, "physician")]))
		found.holds == true
		found.because == ["examination/e1", "follow_up/o"]
	}
}

test_answer_not_recorded if obligation(worker(true, [opinion(null, "physician")])).missing == ["the opinion"]

test_no_damage if quiet(worker(false, []))
