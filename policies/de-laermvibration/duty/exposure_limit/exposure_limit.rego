# METADATA
# title: Highest exposure at the ear
# description: >-
#   With the attenuation of the protector, the noise that acts on the worker's hearing is no more than 85 dB(A) a day
#   and 137 dB(C) peak. The attenuation is estimated by H, M and L (EN ISO 4869-2) less the deduction Ks for practical
#   use.
# custom:
#   cite: LärmVibrationsArbSchV § 8(2) sentence 2
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [measurement, protector_issue, protector, wear_check]
#   remedy: Give the worker a protector with more attenuation that is worn, or lower the exposure.
package duty.exposure_limit

import data.common
import rego.v2

# Without protectors that are worn, the level at the ear is the exposure itself.
obligations contains {
	"key": "level",
	"value": level,
	"at_most": "limit_level",
	"note": said,
	"missing": lacking,
	"because": records,
	"facts": object.union(shown, {"without_protectors_dba": open_level, "estimate": input.protection.working}),
} if {
	level_over
	input.protection != null
}

obligations contains {
	"key": "level",
	"value": open_level,
	"at_most": "limit_level",
	"note": said,
	"missing": common.missing(open_level, "the daily level of the group as it is now"),
	"because": records,
	"facts": shown,
} if {
	level_over
	input.protection == null
}

obligations contains {
	"key": "peak",
	"value": peak,
	"at_most": "limit_peak",
	"note": said,
	"missing": [words | peak == null; words := "the attenuation values H, M and L of the protector, for the peak at the ear"],
	"because": records,
	"facts": object.union(shown, {"without_protectors_dbc": open_peak}),
} if {
	peak_over
}

not_owed contains "the records do not show exposure above the limit now, protectors left aside" if {
	not level_over
	not peak_over
}

level_over if common.any_current(input.exposed.ear_level_exceeded)

peak_over if common.any_current(input.exposed.limit_peak_exceeded)

exposures_now := [exposure | some exposure in input.exposures; common.covers(exposure, input.as_of)]

# The best estimate of the day counts, not that of the week, and without the allowance of the accuracy class: both are for
# the action values.
open_level := max([level | some exposure in exposures_now; some level in best(exposure)]) if {
	count([level | some exposure in exposures_now; some level in best(exposure)]) > 0
} else := null

# After a change that nobody measured, the estimate of the measurement before it stays as lower bound; it decides only
# where it is above the value already.
best(exposure) := [exposure.channels.day.level_dba] if {
	exposure.channels.day.level_dba != null
} else := [other.channels.day.level_dba |
	some other in input.exposures
	other.ref == exposure.ref
	other.channels.day.level_dba != null
	other.channels.day.level_dba > common.at(data.parameters.limit_level, input.as_of)
]

open_peak := max([exposure.channels.peak.at_least | some exposure in exposures_now; exposure.channels.peak.at_least != null])

# A protector that the worker was last seen without protects nobody.
worn if {
	input.protection != null
	not seen_without
}

seen_without if input.wear.worn == false

level := input.protection.under_db if {
	worn
} else := open_level

peak := input.protection.peak_under_dbc if {
	worn
} else := open_peak

lacking := [words | some words in input.protection.missing; level == null] if {
	worn
} else := common.missing(level, "the daily level of the group as it is now")

said := "no protector is at hand; the exposure is the level at the ear" if {
	input.protection == null
} else := "the worker was last seen without protectors, so that the exposure is the level at the ear" if {
	seen_without
} else := "estimated at the ear, under the protector"

shown := {"protector": [model | some held in [input.protection]; model := held.protector]}

records := array.concat(
	common.refs([input.protection]),
	common.refs(exposures_now),
)
