# METADATA
# title: Hearing test attended
# description: >-
#   The employee attends the procedures of health surveillance that the employer asks for, in working hours and at
#   the cost of the employer. The latest offer that was declined or not answered stays open until the worker has come; one
#   of which nothing more is on record is unproven.
# custom:
#   cite: Control of Noise at Work Regulations reg 9(5)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [examination]
#   remedy: Offer the test again, in working hours and at no cost, and explain why the worker has to come.
package duty.test_attended

import data.common
import rego.v2

obligations contains {
	"key": offer.id,
	"holds": attended(offer),
	"on": offer.offered_on,
	"note": said(offer),
	"missing": common.missing(attended(offer), "the test, or the answer of the worker"),
	"because": [offer.ref],
	"facts": {"answer": offer.answer},
} if {
	owed
	some offer in offers
	not offered_again(offer)
}

not_owed contains "no offer of a hearing test is on record" if count(offers) == 0

not_owed contains "the worker is not at or above a lower exposure action value now" if {
	count(offers) > 0
	not owed
}

owed if common.any_current(input.exposed.lower)

offers := [offer | some offer in input.examinations; offer.kind == "hearing_test"; offer.offered_on != null]

attended(offer) if {
	offer.attended_on != null
} else if {
	count(later_tests(offer)) > 0
} else := false if {
	offer.answer in ["declined", "no_answer"]
} else := null

# An offer without a test that a later offer took the place of: the later one is judged.
offered_again(offer) if {
	attended(offer) != true
	some later in offers
	later.offered_on > offer.offered_on
}

# A test after the offer, whether it was made under another offer or without one.
later_tests(offer) := [day |
	some day in array.concat(
		[audiogram.date | some audiogram in input.audiograms],
		[examination.attended_on | some examination in input.examinations; examination.kind == "hearing_test"],
	)
	day != null
	day >= offer.offered_on
]

said(offer) := "the worker was tested" if {
	attended(offer) == true
} else := sprintf("the offer of %s was declined or not answered, and no test is on record", [offer.offered_on]) if {
	attended(offer) == false
} else := sprintf("no test is on record since the offer of %s, and that it was declined is not, either", [offer.offered_on])
