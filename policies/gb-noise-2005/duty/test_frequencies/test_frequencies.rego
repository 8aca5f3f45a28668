# METADATA
# title: Frequencies of a hearing test (guidance)
# description: >-
#   Guidance, not law. Since the edition of 2021 each ear is tested at 500, 1000, 2000, 3000, 4000, 6000 and 8000
#   Hz.
# custom:
#   cite: HSE L108 (2021), audiometric testing (guidance)
#   subject: worker
#   topic: test-quality
#   severity: minor
#   evidence: [audiogram]
#   remedy: Test the frequencies that are missing at the next test, and enter all thresholds that were taken.
package duty.test_frequencies

import data.common
import rego.v2

obligations contains object.union(verdict(audiogram), {
	"key": audiogram.id,
	"on": audiogram.date,
	"because": [audiogram.ref],
}) if {
	some audiogram in judged
}

verdict(audiogram) := {
	"holds": false,
	"note": sprintf("not tested: %s", [concat(", ", audiogram.not_tested)]),
} if {
	count(audiogram.not_tested) > 0
} else := {
	"holds": null,
	"note": sprintf("nothing is recorded of: %s", [concat(", ", audiogram.not_recorded)]),
	"missing": ["the thresholds at these frequencies"],
} if {
	count(audiogram.not_recorded) > 0
} else := {"holds": true}

not_owed contains "no audiogram since the edition of 2021 is on record of a worker at or above an upper exposure action value" if {
	count(judged) == 0
}

judged := [audiogram |
	some audiogram in input.audiograms
	audiogram.invalidated == false
	common.at(data.parameters.test_frequencies, audiogram.date) != null
	some spell in input.exposed.upper
	common.covers(spell, audiogram.date)
]
