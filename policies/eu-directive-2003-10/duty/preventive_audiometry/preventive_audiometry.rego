# METADATA
# title: Preventive audiometry
# description: >-
#   Preventive audiometric testing is available, too, for workers whose exposure exceeds the lower action values,
#   where the assessment and measurement show a risk to health.
# custom:
#   cite: Directive 2003/10/EC Art 10(2)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [examination, audiogram, measurement]
#   remedy: Have the risk judged, or offer the test.
package duty.preventive_audiometry

import data.common
import rego.v2

# Below the upper values the right depends on whether the assessment shows a risk to health, which a professional judges.
obligations contains {
	"key": "now",
	"ask": "Does the assessment show a risk to this worker's health, so that preventive audiometry is to be available?",
	"of": "occupational physician",
	"by": first_offer,
	"facts": {"above_since": common.current_since(input.exposed.lower_exceeded)},
} if {
	above_now
	not above_the_upper
}

not_owed contains "the records do not show exposure above the lower action values now" if not above_now

not_owed contains "above the upper action values the worker has a right to a hearing check, which is a duty of its own" if {
	above_now
	above_the_upper
}

above_now if common.any_current(input.exposed.lower_exceeded)

above_the_upper if common.any_current(input.exposed.upper_exceeded)

offers := sort(array.concat(
	[[test.date, test.ref] | some test in input.audiograms; test.invalidated == false],
	[[day, examination.ref] |
		some examination in input.examinations
		day := min([on | some on in [examination.offered_on, examination.attended_on]; on != null])
	],
))

# Whoever was offered a test has had the answer.
first_offer := null if {
	count(offers) == 0
} else := {"date": offers[0][0], "ref": offers[0][1]}
