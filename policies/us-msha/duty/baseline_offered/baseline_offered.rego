# METADATA
# title: Baseline test offered
# description: >-
#   The operator offers audiometric testing to each miner who is enrolled, to establish a valid baseline, within 6 months
#   of enrolment, or within 12 months where mobile test vans do the testing. An audiogram on record that meets 62.171
#   may serve as the baseline. The offer counts for itself: what the miner makes of it is the matter of
#   baseline-audiogram.
# custom:
#   cite: 30 CFR 62.170(a), (a)(1)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [examination, audiogram]
#   remedy: Offer the miner a baseline test now, and record the offer and the answer.
package duty.baseline_offered

import rego.v2

obligations contains object.union(offer(stretch), {"within": "baseline_time"}) if {
	some stretch in input.enrolled
	not by_van(stretch)
}

obligations contains object.union(offer(stretch), {"within": "baseline_time_mobile"}) if {
	some stretch in input.enrolled
	by_van(stretch)
}

offer(stretch) := {
	"key": stretch.from,
	"after": stretch.from,
	"by": ["audiogram.baseline", "test.offered"],
	"during": {"from": stretch.from, "to": stretch.to},
	"note": sprintf("exposure at or above the action level began on %s", [stretch.from]),
	"because": [exposure.ref | some exposure in input.exposures; exposure.from == stretch.from],
}

by_van(stretch) if stretch.baseline_mobile == true

by_van(stretch) if {
	stretch.baseline_mobile == null
	input.choices.mobile_test_van == true
}

not_owed contains "no stretch at or above the action level is known" if count(input.enrolled) == 0
