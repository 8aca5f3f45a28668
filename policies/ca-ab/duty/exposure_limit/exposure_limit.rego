# METADATA
# title: Exposure within the limits
# description: >-
#   A worker's exposure does not exceed 85 dBA Lex and the limits of Schedule 3, by which no time is allowed from 115
#   dBA on. What was read says nothing of protectors here; they do not count unless the site elects it.
# custom:
#   cite: OHS Code, s. 218
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement, task]
#   remedy: Reduce the noise or the time in it until the exposure is within the limits, and measure again.
package duty.exposure_limit

import data.common
import rego.v2

obligations contains {
	"key": "lex",
	"value": level,
	"at_most": "exposure_limit",
	"note": "daily exposure level, without regard to protectors",
	"missing": common.missing(level, "a daily level, Lex, that can be held against the limit"),
	"because": common.refs([input.first_survey]),
	"facts": {"workers": input.workers},
} if {
	not counted
	surveyed
}

obligations contains {
	"key": m.id,
	"value": m.max_dba,
	"below": "table_ceiling",
	"on": m.date,
	"note": "highest level",
	"because": [m.ref],
} if {
	not counted
	surveyed
	some m in input.measurements
	m.current
	m.max_dba != null
}

obligations contains {
	"lifted": "the site takes protectors to keep the exposure within the limit; what was read of the section says neither",
	"cite": "OHS Code, s. 218",
	"key": "protectors",
} if {
	counted
	surveyed
}

not_owed contains "the exposure of the group was never measured, which is the matter of section 219" if not surveyed

counted if input.choices.protectors_toward_limit == "counted"

surveyed if input.first_survey != null

# A level that is known only within bounds decides where both lie on one side of the limit.
default level := null

level := input.now.channels.day.level_dba if {
	input.now.channels.day.level_dba != null
} else := input.now.channels.day.at_least if {
	common.any_current(input.exposed.daily)
} else := input.now.channels.day.at_most if {
	every stretch in input.exposure_unknown.daily {
		not common.covers(stretch, input.as_of)
	}
}
