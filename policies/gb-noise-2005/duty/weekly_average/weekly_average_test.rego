package duty.weekly_average_test

import data.duty.weekly_average as duty
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

group(change) := object.union(
	{
		"choices": {"weekly_average": true}, "days_vary": null, "workers": 4, "suspected_noisy": true,
		"first_survey": null, "task_day": null,
	},
	change,
)

survey := {"date": "2024-01-10", "ref": "measurement/m1"}

test_varies if obligation(group({"days_vary": true})).holds == true

test_does_not_vary if obligation(group({"days_vary": false})).holds == false

test_not_known if {
	found := obligation(group({}))
	found.holds == null
	found.missing == ["whether the exposure varies markedly from day to day"]
}

test_measured_group if {
	obligation(group({"suspected_noisy": null, "first_survey": survey})).holds == null
	obligation(group({"suspected_noisy": null, "task_day": survey})).holds == null
}

daily(level) := {"suspected_noisy": false, "as_of": "2026-06-30", "now": {"channels": {"daily": {"at_most": level}}}}

test_noise_that_was_not_expected if {
	obligation(group(daily(80))).holds == null
	quiet(group(daily(79.9)))
	quiet(group(daily(null)))
}

test_daily_exposure if quiet(group({"choices": {"weekly_average": false}}))

test_quiet_work if {
	quiet(group({"suspected_noisy": false, "first_survey": survey}))
	quiet(group({"suspected_noisy": null}))
}
