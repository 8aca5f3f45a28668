# METADATA
# title: Told to keep away from loud noise before the baseline
# description: >-
#   The operator notifies miners of the need to avoid high levels of noise for at least 14 hours immediately before the
#   test that determines the baseline. A notice after the test cannot do that.
# custom:
#   cite: 30 CFR 62.170(a)(2)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [notice, audiogram]
#   remedy: >-
#     Add the sentence to the letter or message that invites miners to the baseline test, and keep a record of it.
package duty.quiet_period_notice

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"on": input.baseline.date,
	"because": common.refs([input.baseline, input.baseline.quiet_notice, input.baseline.late_quiet_notice]),
}) if {
	input.baseline != null
	input.baseline.in_program
	not before_the_law
}

before_the_law if input.baseline.date < data.parameters.quiet_period.values[0].from

not_owed contains "the baseline is from before the law began" if before_the_law

verdict := {"holds": true, "note": "the miner was told before the test"} if {
	input.baseline.quiet_notice != null
} else := {"holds": false, "note": "the miner was told only after the test"} if {
	input.baseline.late_quiet_notice != null
} else := {"holds": false, "note": "no notice to avoid loud noise before the test is on record"}

not_owed contains "there is no baseline yet" if input.baseline == null

not_owed contains "the miner has never been in the program" if input.baseline.in_program == false
