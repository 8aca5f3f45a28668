package duty.initial_assessment_test

import data.duty.initial_assessment
import rego.v2

group := {"suspected_noisy": true, "first_survey": null, "measurements": [], "workers": 12, "statistics": null}

survey := {"date": "2024-03-05", "ref": "measurement/m1"}

holds(dossier) := found if found := {o.holds | some o in initial_assessment.obligations} with input as dossier

test_suspected_and_never_measured if {
	holds(group) == {false}
	count(initial_assessment.not_owed) == 0 with input as group
}

test_surveyed if holds(object.union(group, {"first_survey": survey})) == {true}

test_statistics_and_doubts_are_shown if {
	dossier := object.union(group, {
		"first_survey": survey,
		"statistics": {"n": 3, "mean_dba": 86.2, "working": ["n = 3"], "warnings": ["fewer than 6"]},
		"measurements": [{"id": "m1", "doubts": ["cannot be"]}, {"id": "m2", "doubts": []}],
	})
	some o in initial_assessment.obligations with input as dossier
	o.facts == {"n": 3, "mean_dba": 86.2, "working": ["n = 3", "fewer than 6"], "doubts": ["m1: cannot be"]}
}

test_without_statistics if {
	some o in initial_assessment.obligations with input as object.union(group, {"first_survey": survey})
	o.facts == {"doubts": []}
}

test_survey_counts_whatever_was_suspected if {
	every suspicion in [true, false, null] {
		dossier := object.union(group, {"first_survey": survey, "suspected_noisy": suspicion})
		holds(dossier) == {true}
		count(initial_assessment.not_owed) == 0 with input as dossier
	}
}

test_measured_without_result if holds(object.union(group, {"measurements": [{"id": "m1"}]})) == {null}

test_nobody_has_said if {
	some o in initial_assessment.obligations with input as object.union(group, {"suspected_noisy": null})
	o.holds == null
	o.missing == ["whether noise is suspected"]
}

test_not_suspected if {
	quiet := object.union(group, {"suspected_noisy": false})
	holds(quiet) == set()
	count(initial_assessment.not_owed) == 1 with input as quiet
}
