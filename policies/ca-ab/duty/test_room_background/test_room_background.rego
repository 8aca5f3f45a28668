# METADATA
# title: Background noise of the test room
# description: >-
#   The background noise where tests are made does not exceed Table 3 of Schedule 3 in any octave band: 22 dB at 500
#   Hz, 30 dB at 1000 Hz, 35 dB at 2000 Hz, 42 dB at 4000 Hz and 45 dB at 8000 Hz. The levels are from memory; the
#   latest survey is judged.
# custom:
#   cite: OHS Code, s. 223(2)(c), Schedule 3, Table 3
#   subject: room
#   topic: test-quality
#   severity: major
#   evidence: [room_survey, audiogram]
#   remedy: Quieten the room or test elsewhere, survey all five octave bands again, and have a professional look at the tests made in the room.
package duty.test_room_background

import data.common
import rego.v2

said(level, hz, day) := sprintf("the survey of %s has no level in the octave band at %s Hz", [day, hz]) if {
	level == null
} else := sprintf("background level in the octave band at %s Hz, survey of %s", [hz, day])

table_3 := [
	{"band": "500", "at_most": "room_500"},
	{"band": "1000", "at_most": "room_1000"},
	{"band": "2000", "at_most": "room_2000"},
	{"band": "4000", "at_most": "room_4000"},
	{"band": "8000", "at_most": "room_8000"},
]

obligations contains {
	"key": sprintf("%s/%s Hz", [survey.date, line.band]),
	"value": level,
	"at_most": line.at_most,
	"on": survey.date,
	"note": said(level, line.band, survey.date),
	"missing": common.missing(level, "the level in this octave band"),
	"because": [survey.ref],
	"facts": {"band_hz": line.band, "tests_in_room": input.tests, "workers_tested": input.workers},
} if {
	in_use
	survey := input.latest_survey
	survey != null
	some line in table_3
	level := object.get(survey.band, line.band, null)
}

obligations contains {
	"holds": null,
	"note": "tests were made in a room whose background levels are not on record",
	"missing": ["a survey of the background levels"],
	"because": common.refs([input.first_use]),
	"facts": {"tests_in_room": input.tests, "workers_tested": input.workers},
} if {
	in_use
	input.latest_survey == null
}

not_owed contains "no hearing test was made in it" if not in_use

in_use if input.tests > 0
