package duty.test_room_background_test

import data.duty.test_room_background
import rego.v2

survey := {
	"date": "2024-01-10", "ref": "room_survey/R1@2024-01-10",
	"band": {"63": null, "125": 48, "250": 44, "500": 40, "1000": 38, "2000": 40.5, "4000": 50, "8000": null},
}

room := {"tests": 40, "workers": 38, "first_use": {"date": "2024-03-05", "ref": "audiogram/a1"}, "latest_survey": survey}

test_five_bands_are_held_against_the_table if {
	{[o.at_most, o.value] | some o in test_room_background.obligations} == {
		["room_500", 40], ["room_1000", 38], ["room_2000", 40.5], ["room_4000", 50], ["room_8000", null],
	} with input as room
	count(test_room_background.not_owed) == 0 with input as room
}

test_band_not_measured if {
	{[o.note, o.missing] | some o in test_room_background.obligations; o.value == null} == {["the survey of 2024-01-10 has no level in the octave band at 8000 Hz", ["the level in this octave band"]]} with input as room
	every o in test_room_background.obligations {
		o.facts.tests_in_room == 40
	} with input as room
}

test_key_names_survey_and_band if {
	"2024-01-10/500 Hz" in {o.key | some o in test_room_background.obligations} with input as room
}

test_never_surveyed if {
	some o in test_room_background.obligations with input as object.union(room, {"latest_survey": null})
	o.holds == null
	o.because == ["audiogram/a1"]
	o.facts.workers_tested == 38
}

test_not_in_use if {
	idle := object.union(room, {"tests": 0, "first_use": null})
	count(test_room_background.obligations) == 0 with input as idle
	count(test_room_background.not_owed) == 1 with input as idle
}
