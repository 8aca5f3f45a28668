# METADATA
# title: Quiet before the baseline (recommended)
# description: >-
#   The baseline audiogram comes after at least 12 hours without noise. Protectors worn in noise are no substitute for
#   the quiet, unlike in the federal rule.
# custom:
#   cite: NIOSH 98-126, 1.6.2 (from memory)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [audiogram]
#   remedy: >-
#     Find out how long the worker was away from noise before the test; if it was too short, or protectors stood in for
#     it, obtain a new baseline after the quiet period.
package duty.baseline_quiet_period

import rego.v2

obligations contains {
	"value": input.baseline.quiet_hours,
	"at_least": "quiet_period",
	"on": input.baseline.date,
	"missing": ["hours without noise before the baseline" | input.baseline.quiet_hours == null],
	"note": sprintf("hours of quiet before the baseline of %s", [input.baseline.date]),
	"because": [input.baseline.ref],
} if {
	asked_of_the_baseline
	not protectors_instead
}

obligations contains {
	"holds": false,
	"on": input.baseline.date,
	"note": sprintf("before the baseline of %s protectors were worn in place of the quiet period", [input.baseline.date]),
	"because": [input.baseline.ref],
} if {
	asked_of_the_baseline
	protectors_instead
}

asked_of_the_baseline if {
	input.baseline != null
	input.baseline.in_program
}

# Hours of quiet that are on record say more than that protectors were worn.
protectors_instead if {
	input.baseline.quiet_by_protectors == true
	input.baseline.quiet_hours == null
}

not_owed contains "there is no baseline yet" if input.baseline == null

not_owed contains "the worker has never been in the program" if input.baseline.in_program == false
