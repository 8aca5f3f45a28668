package duty.annual_training_test

import data.duty.annual_training as duty
import rego.v2

worker(reading) := {
	"choices": {"annual": reading},
	"enrolled": [{"from": "2021-01-01", "to": null, "current": true, "baseline": null, "tested": null}],
}

test_every_twelve_months if {
	expected := {{"every": "training_interval", "during": {"from": "2021-01-01", "to": null}, "by": "training.any"}}
	duty.obligations == expected with input as worker("twelve_months")
	duty.not_owed == set() with input as worker("twelve_months")
}

test_once_in_each_calendar_year if {
	{o.every | some o in duty.obligations} == {"training_interval_calendar"} with input as worker("calendar_year")
}

test_each_stretch if {
	twice := object.union(worker("twelve_months"), {"enrolled": [
		{"from": "2018-01-01", "to": "2020-01-01"},
		{"from": "2022-01-01", "to": null},
	]})
	count(duty.obligations) == 2 with input as twice
}

test_never_exposed if {
	quiet := {"choices": {"annual": "twelve_months"}, "enrolled": []}
	duty.obligations == set() with input as quiet
	duty.not_owed == {"no stretch at or above the action level is known"} with input as quiet
}
