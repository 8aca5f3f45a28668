# METADATA
# title: Exposure of the group determined
# description: >-
#   Where it cannot be established for certain that the action values (Auslösewerte) are kept, the exposure is
#   measured. The methods must allow that to be decided; by TRLV Lärm 2 § 9 an action value within the margin of the
#   accuracy class counts as exceeded.
# custom:
#   cite: LärmVibrationsArbSchV § 3(1), § 4(1)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [measurement, task, group]
#   remedy: >-
#     Measure the daily noise exposure level of the group with its accuracy class, or describe its day by tasks with
#     their levels.
package duty.exposure_determined

import data.common
import rego.v2

obligations contains {
	"holds": answer,
	"note": said,
	"missing": [words | answer == null; words := "an exposure that can be held against the action values"],
	"because": sort({measurement.ref | some measurement in input.measurements; measurement.current == true}),
	"facts": {"workers": input.workers, "measurements": count(input.measurements)},
} if {
	not no_noise_expected
}

not_owed contains "nothing suggests that the group works in noise, and it was not measured" if no_noise_expected

no_noise_expected if {
	input.suspected_noisy == false
	not assessed
}

assessed if count(input.measurements) > 0

assessed if input.task_day != null

# Where nothing was measured, noise that somebody suspects is a gap. Where nobody has said, it stays open.
answer if {
	count(open_now) == 0
} else := null if {
	assessed
} else := false if {
	input.suspected_noisy == true
} else := null

said := null if {
	answer == true
} else := sprintf("it is not known how the exposure stands: %s", [concat("; ", open_now)])

# The action values and the limit as a whole: the level of the day or week, or the peak.
values := ["lower_reached", "lower_exceeded", "upper_reached", "upper_exceeded", "limit"]

open_now := common.reasons([stretch | some value in values; some stretch in input.exposure_unknown[value]], input.as_of)
