# METADATA
# title: Baseline audiogram
# description: >-
#   Within 6 months of enrolment, or 12 months where mobile test vans do the testing, the operator offers and provides
#   audiometric testing that results in a valid baseline audiogram. Taking part is voluntary: where the miner declined
#   the test that was offered, no audiogram is missed.
# custom:
#   cite: 30 CFR 62.170(a)(1)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram, examination, measurement, assignment]
#   remedy: >-
#     Test the miner now, after the quiet period, and file the result as the baseline audiogram; if the miner declines,
#     record offer and answer.
package duty.baseline_audiogram

import data.common
import rego.v2

obligations contains object.union(first_test(stretch), {"within": "baseline_time"}) if {
	some stretch in input.enrolled
	asked_for(stretch)
	not by_van(stretch)
}

obligations contains object.union(first_test(stretch), {"within": "baseline_time_mobile"}) if {
	some stretch in input.enrolled
	asked_for(stretch)
	by_van(stretch)
}

obligations contains {
	"key": stretch.from,
	"lifted": sprintf("the miner declined the test that was offered on %s", [declined(stretch)[0].offered_on]),
	"cite": "30 CFR 62.170(a)(1), 62.140 (summary table)",
	"because": common.refs(declined(stretch)),
} if {
	some stretch in input.enrolled
	count(declined(stretch)) > 0
}

obligations contains {
	"key": stretch.from,
	"holds": null,
	"note": "a baseline test was offered, and the record does not say what the miner answered",
	"missing": ["the miner's answer to the offer"],
	"because": common.refs(unanswered(stretch)),
} if {
	some stretch in input.enrolled
	stretch.baseline == null
	count(declined(stretch)) == 0
	count(unanswered(stretch)) > 0
}

asked_for(stretch) if {
	stretch.baseline != null
	count(declined(stretch)) == 0
}

asked_for(stretch) if {
	stretch.baseline == null
	count(declined(stretch)) == 0
	count(unanswered(stretch)) == 0
}

# The clock starts with the first day of exposure, not with the day of hire.
first_test(stretch) := {
	"key": stretch.from,
	"after": stretch.from,
	"by": stretch.baseline,
	"during": {"from": stretch.from, "to": stretch.to},
	"note": sprintf("exposure at or above the action level began on %s", [stretch.from]),
	"because": [exposure.ref | some exposure in input.exposures; exposure.from == stretch.from],
}

by_van(stretch) if stretch.baseline_mobile == true

by_van(stretch) if {
	stretch.baseline_mobile == null
	input.choices.mobile_test_van == true
}

offers(stretch) := [offer |
	some offer in input.examinations
	offer.kind == "hearing_test"
	offer.attended_on == null
	offer.offered_on != null
	common.covers(stretch, offer.offered_on)
	not baseline_before(stretch, offer.offered_on)
]

baseline_before(stretch, day) if {
	stretch.baseline != null
	stretch.baseline.date < day
}

declined(stretch) := [offer | some offer in offers(stretch); offer.answer == "declined"]

unanswered(stretch) := [offer | some offer in offers(stretch); offer.answer == null]

not_owed contains "no stretch at or above the action level is known" if count(input.enrolled) == 0
