# METADATA
# title: Protectors where a limit is exceeded
# description: >-
#   Where a limit is exceeded while means are put in place, during repair or maintenance, or because it cannot be met,
#   the employer gives the workers protectors free of charge, or shortens their daily exposure until it is within the
#   limits. The cases and the choice are from a secondary source; that protectors are free is from memory.
# custom:
#   cite: r. 13, s. 136
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [protector_issue, measurement, assignment]
#   remedy: Give the worker a suitable protector now and record it, or shorten the exposure and measure it.
package duty.protectors_provided

import data.common
import rego.v2

obligations contains {
	"key": spell.from,
	"holds": input.protection != null,
	"note": note,
	"because": array.concat(common.refs([input.protection]), common.refs(input.results)),
	"facts": {"exposed_since": spell.from, "working": input.exposure_working},
} if {
	some spell in above
}

obligations contains {
	"key": "exposure",
	"holds": null,
	"note": sprintf("it is not known whether a limit is exceeded: %s", [concat("; ", not_known_now)]),
	"missing": ["an exposure that can be held against the limits"],
} if {
	count(above) == 0
	count(not_known_now) > 0
}

not_owed contains "the worker is not above a limit now" if {
	count(above) == 0
	count(not_known_now) == 0
}

note := "the worker is above a limit and has no protector" if {
	input.protection == null
} else := null

above := [spell | some spell in input.exposed.limit; spell.current]

not_known_now := common.reasons(input.exposure_unknown.limit, input.as_of)
