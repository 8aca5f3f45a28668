# METADATA
# title: Quiet before the baseline
# description: >-
#   The miner is not exposed to workplace noise for at least 14 hours immediately before the test that determines the
#   baseline. Hearing protectors may be used in place of this quiet period.
# custom:
#   cite: 30 CFR 62.170(a)(2)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram]
#   remedy: >-
#     Find out how long the miner was away from workplace noise before the test, and whether protectors were worn; if
#     neither is enough, obtain a new baseline after the quiet period.
package duty.baseline_quiet_period

import rego.v2

obligations contains {
	"holds": true,
	"on": input.baseline.date,
	"note": "protectors were worn in place of the quiet period",
	"because": [input.baseline.ref],
} if {
	asked_of_the_baseline
	protectors_instead
}

obligations contains {
	"value": input.baseline.quiet_hours,
	"at_least": "quiet_period",
	"on": input.baseline.date,
	"missing": missing,
	"note": said,
	"because": [input.baseline.ref],
} if {
	asked_of_the_baseline
	not protectors_instead
}

asked_of_the_baseline if {
	input.baseline != null
	input.baseline.in_program
	not before_the_law
}

before_the_law if input.baseline.date < data.parameters.quiet_period.values[0].from

not_owed contains "the baseline is from before the law began" if before_the_law

protectors_instead if input.baseline.quiet_by_protectors == true

said := sprintf("it is not known how long it was quiet before the baseline of %s, and no protectors are on record in its place", [input.baseline.date]) if {
	input.baseline.quiet_hours == null
} else := sprintf("quiet before the baseline of %s, with no protectors on record in its place", [input.baseline.date])

missing := ["hours without workplace noise before the baseline"] if {
	input.baseline.quiet_hours == null
} else := []

not_owed contains "there is no baseline yet" if input.baseline == null

not_owed contains "the miner has never been in the program" if input.baseline.in_program == false
