package duty.levels_assessed_test

import data.duty.levels_assessed as duty
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

survey := {"date": "2024-01-10", "ref": "measurement/m1"}

group(change) := object.union(
	{
		"as_of": "2026-06-30", "workers": 4, "suspected_noisy": true, "first_survey": null, "task_day": null,
		"exposure_unknown": {"lower": [], "upper": [], "limit": []},
	},
	change,
)

test_nothing_on_record if obligation(group({})).holds == false

test_measured if {
	found := obligation(group({"first_survey": survey}))
	found.holds == true
	found.because == ["measurement/m1"]
}

test_tasks_with_levels_are_enough if obligation(group({"task_day": survey})).holds == true

test_one_value_not_known if {
	every level in ["lower", "upper", "limit"] {
		found := obligation(group({"first_survey": survey, "exposure_unknown": {level: [open]}}))
		found.holds == null
		found.note == "the levels cannot be held against every value: not measured"
	}
}

test_what_was_not_known_before_does_not_matter if {
	former := {"from": "2020-01-01", "to": "2021-01-01", "reason": "not measured"}
	obligation(group({"first_survey": survey, "exposure_unknown": {"lower": [former]}})).holds == true
}

test_measured_though_not_suspected if {
	every suspected in [false, null] {
		obligation(group({"suspected_noisy": suspected, "first_survey": survey})).holds == true
	}
}

test_quiet_work if {
	quiet(group({"suspected_noisy": false}))
	quiet(group({"suspected_noisy": null}))
}
