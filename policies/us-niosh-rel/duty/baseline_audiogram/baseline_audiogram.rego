# METADATA
# title: Baseline audiogram (recommended)
# description: >-
#   A worker who joins the program has a baseline audiogram before employment, or within 30 days of enrolment. A test
#   from before the first day at or above the REL counts.
# custom:
#   cite: NIOSH 98-126, 1.6.2 (from memory)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [audiogram, measurement, assignment]
#   remedy: >-
#     Test the worker now, after 12 hours of quiet without protectors in place of it, and file the result as the baseline
#     audiogram.
package duty.baseline_audiogram

import rego.v2

obligations contains {
	"key": stretch.from,
	"after": stretch.from,
	"within": "baseline_time",
	"by": stretch.baseline,
	"during": {"from": stretch.from, "to": stretch.to},
	"note": sprintf("exposure at or above the REL began on %s", [stretch.from]),
	"because": [exposure.ref | some exposure in input.exposures; exposure.from == stretch.from; exposure.ref != null],
} if {
	some stretch in input.enrolled
}

not_owed contains "no stretch at or above the REL is known" if count(input.enrolled) == 0
