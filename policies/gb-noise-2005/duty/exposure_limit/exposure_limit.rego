# METADATA
# title: Exposure limit value
# description: >-
#   Nobody is exposed above an exposure limit value. Unlike for the action values, the protection of hearing
#   protectors that the employer provided under regulation 7(2) counts, for the time in which they are worn: a
#   worker who was seen without them has none. The level at the ear is estimated by the rating of the protector,
#   with the allowance for use in the real world that HSE recommends; where only that allowance makes it exceed the
#   limit value, the duty is unproven, since the allowance is guidance. The peak at the ear is estimated by a method
#   from memory.
# custom:
#   cite: Control of Noise at Work Regulations regs 6(4)(a), 4(3), 4(5)
#   subject: worker
#   topic: controls
#   severity: major
#   evidence: [measurement, protector_issue, protector, wear_check]
#   remedy: Reduce exposure below the limit value at once, find out why it was exceeded and change the measures; a protector with more attenuation counts only where it is worn.
package duty.exposure_limit

import data.common
import rego.v2

obligations contains object.union(level, {"key": "LEP"}) if {
	not exempted
	above.limit_level
}

obligations contains object.union(peak, {"key": "LCpeak"}) if {
	not exempted
	above.limit_peak
}

obligations contains {
	"key": "not known",
	"holds": null,
	"note": sprintf("it is not known whether exposure without protectors is above a limit value: %s", [concat("; ", not_known)]),
	"missing": ["an exposure that can be held against the limit values"],
} if {
	not exempted
	count(not_known) > 0
}

obligations contains {
	"lifted": "a certificate exempts the site from the limit values",
	"cite": exemption_cite[input.choices.exemption],
	"on": input.as_of,
} if {
	exempted
	above[_]
}

not_owed contains "exposure without protectors is not known to be above a limit value" if {
	not any_above
	count(not_known) == 0
}

not_owed contains "a certificate exempts the site from the limit values" if {
	exempted
	not any_above
	count(not_known) > 0
}

any_above if above[_]

above[name] if {
	some name in ["limit_level", "limit_peak"]
	common.any_current(input.exposed[name])
}

# Of a worker who is not known to be at or above a lower action value, exposure-assessed tells.
not_known := [stretch.reason |
	common.any_current(input.exposed.lower)
	some stretch in input.exposure_unknown.limit
	common.covers(stretch, input.as_of)
]

# The personal noise exposure: at the ear where a protector counts, else without it. Where only the allowance, which is
# guidance, lifts it above the limit value, nothing is said to be exceeded.
level := {
	"holds": null,
	"note": sprintf("estimated exposure with the protector: %v dBA with the allowance of %v dB for the real world, which is guidance; without it the limit value would not be exceeded", [at_the_ear, allowance]),
	"missing": ["an estimate on which the allowance does not decide, such as that of a protector with more attenuation"],
	"because": array.concat(exposure_refs, protector_refs),
	"facts": estimate,
} if {
	protected
	at_the_ear > limit
	at_the_ear - allowance <= limit
} else := {
	"value": at_the_ear,
	"at_most": "limit_value",
	"note": "estimated exposure with the protector",
	"missing": input.protection.missing,
	"because": array.concat(exposure_refs, protector_refs),
	"facts": estimate,
} if {
	protected
} else := {
	"value": without(lep),
	"at_most": "limit_value",
	"note": unprotected,
	"because": array.concat(exposure_refs, seen_without),
}

estimate := {
	"protector": input.protection.protector,
	"exposure_dba": input.protection.exposure_dba,
	"at_the_ear_dba": at_the_ear,
	"allowance_db": allowance,
	"method": input.protection.method,
	"working": input.protection.working,
	"formula": input.protection.mark,
	"for_information": [sprintf("%s: %s", [other.method, other.working]) | some other in input.protection.information],
}

limit := common.at(data.parameters.limit_value, input.as_of)

allowance := common.at(data.parameters.real_world_allowance, input.as_of)

peak := {
	"value": input.protection.peak_under_dbc,
	"at_most": "peak_limit_value",
	"note": "estimated peak with the protector, by EN 458 from memory",
	"missing": ["the H, M and L values of the protector" | input.protection.peak_under_dbc == null],
	"because": array.concat(exposure_refs, protector_refs),
	"facts": {"protector": input.protection.protector, "peak_without_protector_dbc": input.protection.peak_dbc},
} if {
	protected
} else := {
	"value": without("peak"),
	"at_most": "peak_limit_value",
	"note": unprotected,
	"because": array.concat(exposure_refs, seen_without),
}

protected if {
	input.protection != null
	count(seen_without) == 0
}

# A worker who was last seen without protectors since they were handed over.
seen_without := [input.wear.ref |
	input.protection != null
	input.wear != null
	input.wear.worn == false
	input.wear.date >= input.protection.date
]

unprotected := "exposure without protectors, since none is at hand" if {
	input.protection == null
} else := "exposure without protectors, since the worker was seen without them"

lep := "weekly" if {
	input.choices.weekly_average == true
} else := "daily"

# The estimate is one of the day. Where the site averages over the week, it is shifted as the level without protector is.
at_the_ear := input.protection.under_db if {
	lep == "daily"
} else := null if {
	some figure in [input.protection.under_db, without("weekly"), without("daily")]
	figure == null
} else := (input.protection.under_db + without("weekly")) - without("daily")

# The level without protectors; where only a lower bound is known, that.
without(channel) := found if {
	some exposure in now
	some found in [exposure.channels[channel].level_dba, exposure.channels[channel].at_least]
	found != null
} else := null

now := [exposure | some exposure in input.exposures; common.covers(exposure, input.as_of)]

exposure_refs := common.refs(now)

protector_refs := [input.protection.ref, sprintf("protector/%s", [input.protection.protector])]

exempted if input.choices.exemption in object.keys(exemption_cite)

exemption_cite := {
	"overall_risk": "Control of Noise at Work Regulations reg 11",
	"emergency_services": "Control of Noise at Work Regulations reg 12",
	"defence": "Control of Noise at Work Regulations reg 13",
}
