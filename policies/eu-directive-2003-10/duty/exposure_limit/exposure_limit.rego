# METADATA
# title: Exposure limit at the ear
# description: >-
#   In no circumstances does the exposure exceed the limit values, taking account of the attenuation of the protectors
#   that the worker wears. The Directive does not say whether the attenuation of the label or that of real use counts;
#   here it is that of the label, by the single number rating.
# custom:
#   cite: Directive 2003/10/EC Art 7(1), Art 3(1)(a), 3(2)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [measurement, protector_issue, protector, wear_check]
#   remedy: >-
#     Bring the exposure below the limit at once: by less noise, shorter time, or a protector with more attenuation
#     that is worn.
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

level_over if common.any_current(input.exposed.limit_level_exceeded)

peak_over if common.any_current(input.exposed.limit_peak_exceeded)

exposures_now := [exposure | some exposure in input.exposures; common.covers(exposure, input.as_of)]

# The level of the week counts where the site has elected it.
channel := "week" if {
	input.choices.weekly_average == true
} else := "day"

open_level := max([exposure.channels[channel].at_least | some exposure in exposures_now; exposure.channels[channel].at_least != null])

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

lacking := [words | some words in input.protection.missing; level == null]

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
