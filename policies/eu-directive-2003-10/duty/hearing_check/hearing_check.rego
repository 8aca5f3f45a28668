# METADATA
# title: Right to a hearing check
# description: >-
#   A worker whose exposure exceeds the upper action values has the right to have their hearing checked by a doctor,
#   or by another qualified person under the responsibility of a doctor.
# custom:
#   cite: Directive 2003/10/EC Art 10(2)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [examination, audiogram, measurement]
#   remedy: Offer the worker a hearing check and record the offer.
package duty.hearing_check

import data.common
import rego.v2

obligations contains {
	"key": "now",
	"holds": count(offered) > 0,
	"note": said,
	"because": offered,
	"facts": {"above_since": common.current_since(input.exposed.upper_exceeded)},
} if {
	above_now
}

not_owed contains "the records do not show exposure above the upper action values now" if not above_now

above_now if common.any_current(input.exposed.upper_exceeded)

# A test on record was available; so was one that was offered and declined.
offered := array.concat(
	[test.ref | some test in input.audiograms; test.invalidated == false],
	common.refs(input.examinations),
)

said := "exposure is above the upper action values, and no hearing check was made or offered" if count(offered) == 0

else := null
