# METADATA
# title: Told to keep away from loud noise before the baseline
# description: >-
#   The employer notifies employees of the need to avoid high levels of non-occupational noise exposure during the
#   quiet period that goes before the baseline audiogram. A notice after the test cannot do that.
# custom:
#   cite: 29 CFR 1910.95(g)(5)(iv)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [notice, audiogram]
#   remedy: >-
#     Add the sentence to the letter or message that invites workers to the baseline test, and keep a record of it.
package duty.quiet_period_notice

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"on": input.baseline.date,
	"because": common.refs([input.baseline, input.baseline.quiet_notice, input.baseline.late_quiet_notice]),
}) if {
	input.baseline != null
	input.baseline.in_program
}

verdict := {"holds": true, "note": "the worker was told before the test"} if {
	input.baseline.quiet_notice != null
} else := {"holds": false, "note": "the worker was told only after the test"} if {
	input.baseline.late_quiet_notice != null
} else := {"holds": false, "note": "no notice to avoid loud noise before the test is on record"}

not_owed contains "there is no baseline yet" if input.baseline == null

not_owed contains "the worker has never been in the program" if input.baseline.in_program == false
