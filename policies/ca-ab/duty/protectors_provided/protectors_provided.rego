# METADATA
# title: Protectors provided
# description: >-
#   Workers exposed above 82 dBA Lex, until 30 March 2023 above 85 dBA Lex, are given hearing protectors that meet CSA
#   Z94.2. The levels are from secondary sources.
# custom:
#   cite: OHS Code, s. 222
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [protector_issue, measurement, assignment]
#   remedy: Give the worker a suitable protector now, and record it.
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
	"note": sprintf("it is not known whether protectors are to be worn: %s", [concat("; ", not_known_now)]),
	"missing": ["an exposure that can be held against the level of protectors"],
} if {
	count(above) == 0
	count(not_known_now) > 0
}

not_owed contains "the worker is not above the level of protectors now" if {
	count(above) == 0
	count(not_known_now) == 0
}

note := "the worker is above the level of protectors and has none" if {
	input.protection == null
} else := null

not_known_now := common.reasons(input.exposure_unknown.protectors, input.as_of)

above := [spell | some spell in input.exposed.protectors; spell.current]
