package duty.damage_reviewed_test

import data.duty.damage_reviewed
import rego.v2

done(kind, day, result) := {"date": day, "ref": sprintf("follow_up/%s", [kind]), "kind": kind, "result": result}

worker(follow_ups) := {"audiograms": [], "examinations": [
	{"ref": "examination/e1", "attended_on": "2025-03-01", "results_on": null, "damage": true, "follow_ups": follow_ups},
]}

answer(dossier) := found if found := {key: by | some o in damage_reviewed.obligations; key := o.key; by := o.by} with input as dossier

from_noise := done("damage_opinion", "2025-04-01", "work_related")

test_nothing_reviewed if {
	answer(worker([from_noise])) == {
		"assessment of examination/e1": null,
		"measures of examination/e1": null,
		"others of examination/e1": null,
	}
	count(damage_reviewed.not_owed) == 0 with input as worker([from_noise])
}

test_reviewed if {
	reviewed := [from_noise, done("assessment_reviewed", "2025-04-01", null), done("alternative_work", "2025-05-01", null), done("group_reviewed", "2025-05-02", null)]
	found := answer(worker(reviewed))
	found["assessment of examination/e1"].date == "2025-04-01"
	found["measures of examination/e1"].ref == "follow_up/alternative_work"
	found["others of examination/e1"].date == "2025-05-02"
}

test_review_of_before_the_opinion_does_not_count if {
	answer(worker([from_noise, done("assessment_reviewed", "2025-03-31", null)]))["assessment of examination/e1"] == null
}

test_noise_is_not_the_cause if {
	answer(worker([done("medical_opinion", "2025-04-01", "not_work_related")])) == {}
	count(damage_reviewed.not_owed) == 1 with input as worker([])
}

test_the_latest_opinion_counts if {
	other := done("medical_opinion", "2025-03-15", "not_work_related")
	count(answer(worker([other, from_noise]))) == 3
	answer(worker([from_noise, other])) == {}
}

test_found_after_a_hearing_test if {
	noted := done("damage_found", "2025-03-05", null)
	found := answer({"examinations": [], "audiograms": [{"ref": "audiogram/a1", "date": "2025-03-01", "follow_ups": [noted, from_noise]}]})
	count(found) == 3
	answer({"examinations": [], "audiograms": [{"ref": "audiogram/a1", "date": "2025-03-01", "follow_ups": [from_noise]}]}) == {}
}
