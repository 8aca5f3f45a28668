package duty.annual_audiogram_test

import data.duty.annual_audiogram as duty
import rego.v2

after_baseline := {"from": "2021-03-01", "to": null, "current": true}

worker(reading, tested) := {
	"choices": {"annual": reading},
	"enrolled": [{"from": "2021-01-01", "to": null, "current": true, "tested": tested}],
}

test_every_twelve_months if {
	expected := {{"every": "audiogram_interval", "during": after_baseline, "by": "audiogram.valid"}}
	duty.obligations == expected with input as worker("twelve_months", after_baseline)
	duty.not_owed == set() with input as worker("twelve_months", after_baseline)
}

test_once_in_each_calendar_year if {
	expected := {{"every": "audiogram_interval_calendar", "during": after_baseline, "by": "audiogram.valid"}}
	duty.obligations == expected with input as worker("calendar_year", after_baseline)
}

test_stretch_that_ended_before_a_baseline_is_left_out if {
	twice := {
		"choices": {"annual": "twelve_months"},
		"enrolled": [
			{"from": "2018-01-01", "to": "2018-03-01", "current": false, "tested": null},
			{"from": "2021-01-01", "to": null, "current": true, "tested": after_baseline},
		],
	}
	{o.during.from | some o in duty.obligations} == {"2021-03-01"} with input as twice
	duty.not_owed == set() with input as twice
}

test_no_baseline_yet if {
	duty.obligations == set() with input as worker("twelve_months", null)
	duty.not_owed == {"there is no baseline yet"} with input as worker("twelve_months", null)
}

test_never_exposed if {
	quiet := {"choices": {"annual": "twelve_months"}, "enrolled": []}
	duty.obligations == set() with input as quiet
	duty.not_owed == {"no stretch at or above the action level is known"} with input as quiet
}
