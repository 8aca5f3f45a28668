# METADATA
# title: Repeat test after a worsening (guidance)
# description: >-
#   Guidance, not law. A worsening of more than 10 dB at any tested frequency against the test before calls for a
#   repeat test within a reasonable time, of the order of three months. Where the test before is of before the
#   edition of 2021, 500 and 8000 Hz need not be there to compare.
# custom:
#   cite: HSE L108 (2021), audiometric testing (guidance)
#   subject: worker
#   topic: follow-up
#   severity: minor
#   evidence: [audiogram, examination]
#   remedy: Repeat the test, and let the occupational-health professional compare both.
package duty.test_repeated

import data.common
import rego.v2

obligations contains {
	"key": audiogram.id,
	"after": audiogram.date,
	"within": "repeat_time",
	"by": following(audiogram),
	"note": sprintf("the test of %s shows a worsening against the one before", [audiogram.date]),
	"because": [audiogram.ref],
	"health": {"ears": [ear | some ear in ["left", "right"]; audiogram.schemes.worsened[ear] == true]},
} if {
	some audiogram in judged
	worse(audiogram) == true
}

obligations contains {
	"key": audiogram.id,
	"holds": null,
	"on": audiogram.date,
	"note": sprintf("the test of %s cannot be compared with the one before", [audiogram.date]),
	"missing": ["thresholds of this test or of the one before"],
	"because": [audiogram.ref],
} if {
	some audiogram in judged
	worse(audiogram) == null
}

not_owed contains "no later test shows a worsening against the one before" if {
	every audiogram in judged { worse(audiogram) == false }
}

worse(audiogram) if {
	some ear in ["left", "right"]
	audiogram.schemes.worsened[ear] == true
} else := false if {
	of_an_earlier_edition(before(audiogram))
	every ear in ["left", "right"] { audiogram.schemes.worsened_core[ear] == false }
} else := null if {
	some ear in ["left", "right"]
	audiogram.schemes.worsened[ear] == null
} else := false

# A test from before the edition of 2021, which did not ask for 500 and 8000 Hz yet.
of_an_earlier_edition(audiogram) if common.at(data.parameters.test_frequencies, audiogram.date) == null

before(audiogram) := earlier[count(earlier) - 1] if {
	earlier := [other | some other in counted; other.date < audiogram.date]
}

# Tests since the edition of 2021 that come after another one, while at or above an upper exposure action value.
judged := [audiogram |
	some audiogram in counted
	audiogram.date > counted[0].date
	common.at(data.parameters.repeat_change, audiogram.date) != null
	some spell in input.exposed.upper
	common.covers(spell, audiogram.date)
]

counted := [audiogram | some audiogram in input.audiograms; audiogram.invalidated == false]

following(audiogram) := {"date": first[0], "ref": first[1]} if {
	first := min([test | some test in tests; test[0] > audiogram.date])
} else := null

tests := array.concat(
	[[audiogram.date, audiogram.ref] | some audiogram in counted],
	[[e.attended_on, e.ref] | some e in input.examinations; e.kind == "hearing_test"; e.attended_on != null],
)
