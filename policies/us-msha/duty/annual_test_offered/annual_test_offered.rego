# METADATA
# title: Annual test offered
# description: >-
#   After the baseline is established, the operator offers audiometric testing at intervals not exceeding 12 months for as
#   long as the miner is in the program. It is the offer that is owed: a miner who declines is offered the test again
#   within 12 months. A test made counts as offered on its day; a retest that stands in for a test does not count again.
# custom:
#   cite: 30 CFR 62.170(b)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [examination, audiogram]
#   remedy: Offer the miner a hearing test now, and record the offer and the answer.
package duty.annual_test_offered

import rego.v2

obligations contains {"every": "annual_interval", "during": stretch, "by": "test.offered"} if some stretch in after_baseline

# The parts of the miner's time in the program that come after the baseline.
after_baseline := [stretch.tested | some stretch in input.enrolled; stretch.tested != null]

not_owed contains "no stretch at or above the action level is known" if count(input.enrolled) == 0

not_owed contains "there is no baseline yet" if {
	count(input.enrolled) > 0
	count(after_baseline) == 0
}
