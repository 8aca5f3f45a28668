package duty.damage_opinion_test

import data.duty.damage_opinion
import rego.v2

opinion(kind, result) := {"date": "2025-04-01", "ref": "follow_up/f1", "kind": kind, "result": result, "by_is": "physician"}

worker(follow_ups) := {"audiograms": [], "examinations": [
	{"ref": "examination/e1", "attended_on": "2025-03-01", "results_on": null, "damage": true, "follow_ups": follow_ups},
	{"ref": "examination/e2", "attended_on": "2024-03-01", "results_on": null, "damage": false, "follow_ups": []},
]}

answer(dossier) := found if found := {o.by | some o in damage_opinion.obligations} with input as dossier

test_nobody_has_judged if {
	answer(worker([])) == {null}
	answer(worker([opinion("damage_opinion", null), opinion("referral", "work_related")])) == {null}
	count(damage_opinion.not_owed) == 0 with input as worker([])
}

test_judged if {
	every kind in ["damage_opinion", "medical_opinion"] {
		answer(worker([opinion(kind, "not_work_related")])) == {{"date": "2025-04-01", "ref": "follow_up/f1"}}
	}
}

test_found_after_a_hearing_test if {
	noted := {"date": "2025-03-05", "ref": "follow_up/f0", "kind": "damage_found", "result": null}
	some o in damage_opinion.obligations with input as {"examinations": [], "audiograms": [{"ref": "audiogram/a1", "date": "2025-03-01", "follow_ups": [noted]}]}
	o.key == "audiogram/a1"
	o.by == null
}

test_no_damage if {
	answer({"audiograms": [], "examinations": []}) == set()
	count(damage_opinion.not_owed) == 1 with input as {"audiograms": [], "examinations": []}
}
