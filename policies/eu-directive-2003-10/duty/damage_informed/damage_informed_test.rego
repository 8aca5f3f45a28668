package duty.damage_informed_test

import data.duty.damage_informed
import rego.v2

done(kind, result) := {"date": "2025-04-01", "ref": sprintf("follow_up/%s", [kind]), "kind": kind, "result": result}

worker(told_on, follow_ups) := {"audiograms": [], "examinations": [
	{"ref": "examination/e1", "attended_on": "2025-03-01", "results_on": told_on, "damage": true, "follow_ups": follow_ups},
]}

answer(dossier) := found if found := {o.by | some o in damage_informed.obligations} with input as dossier

from_noise := done("damage_opinion", "work_related")

test_not_told if {
	answer(worker(null, [from_noise])) == {null}
	count(damage_informed.not_owed) == 0 with input as worker(null, [from_noise])
}

test_told if {
	answer(worker(null, [from_noise, done("worker_informed", null)])) == {{"date": "2025-04-01", "ref": "follow_up/worker_informed"}}
	answer(worker("2025-04-02", [from_noise])) == {{"date": "2025-04-02", "ref": "examination/e1"}}
}

test_noise_is_not_the_cause if {
	answer(worker(null, [done("damage_opinion", "not_work_related")])) == set()
	answer(worker(null, [])) == set()
	count(damage_informed.not_owed) == 1 with input as worker(null, [])
}

test_the_latest_opinion_counts if {
	other := done("medical_opinion", "not_work_related")
	answer(worker(null, [other, from_noise])) == {null}
	answer(worker(null, [from_noise, other])) == set()
}

test_found_after_a_hearing_test if {
	noted := done("damage_found", null)
	answer({"examinations": [], "audiograms": [{"ref": "audiogram/a1", "date": "2025-03-01", "follow_ups": [noted, from_noise]}]}) == {null}
	answer({"examinations": [], "audiograms": [{"ref": "audiogram/a1", "date": "2025-03-01", "follow_ups": [from_noise]}]}) == set()
}
