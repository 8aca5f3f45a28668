# METADATA
# title: Review of a significant threshold shift (recommended)
# description: >-
#   A shift that a second test shows in the same ear at the same frequency is a significant threshold shift by its
#   numbers. A professional confirms it: an audiologist or a physician who reviews the test.
# custom:
#   cite: NIOSH 98-126, 1.6.4
#   subject: worker
#   topic: follow-up
#   severity: minor
#   evidence: [audiogram]
#   remedy: >-
#     Have an audiologist or a physician review the two tests, and enter the reviewer and the day.
package duty.shift_review

import data.common
import rego.v2

obligations contains {
	"key": shift.id,
	"ask": "Is the change of hearing that two tests show a significant threshold shift, and what follows from it?",
	"of": "audiologist or physician",
	"by": review(shift),
	"note": sprintf("the test of %s confirms a shift of an earlier one", [shift.date]),
	"facts": {"ears": shift.ears, "known_only_as_at_least": shift.at_least},
	"health": shift.hearing,
	"because": common.refs([shift.confirms, shift]),
} if {
	some shift in input.shifts
}

not_owed contains "no shift is confirmed by a second test" if count(input.shifts) == 0

not_owed contains "a shift waits for its second test, which is the matter of confirmation-audiogram" if {
	count(input.shifts) == 0
	count(input.unconfirmed) > 0
}

review(shift) := {"date": reviewed[0].reviewed_on, "ref": reviewed[0].ref} if {
	reviewed := [test |
		some test in input.audiograms
		test.ref == shift.ref
		test.reviewed_on != null
		test.reviewer_is in data.measures.hearing.professionals
	]
	count(reviewed) > 0
} else := null
