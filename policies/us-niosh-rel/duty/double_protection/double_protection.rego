# METADATA
# title: Double protection (recommended)
# description: >-
#   At a time-weighted average of 100 dBA or more, an earplug and an earmuff are worn together. Both are looked for
#   among the protectors at hand; whether protectors are worn is the matter of protectors-worn. That the recommendation
#   begins at 100 dBA, and not only above it, is from memory.
# custom:
#   cite: NIOSH 98-126, 1.5
#   subject: worker
#   topic: protectors
#   severity: minor
#   evidence: [protector_issue, protector, measurement]
#   remedy: >-
#     Give the worker an earplug and an earmuff, see to it that both are worn together, and record both issues.
package duty.double_protection

import data.common
import rego.v2

obligations contains object.union(verdict, {"because": common.refs([input.protection])}) if owed

obligations contains {
	"holds": null,
	"note": sprintf("it is not known whether exposure is at or above the level for double protection: %s", [concat("; ", not_known)]),
	"missing": ["an exposure that can be held against the level for double protection"],
} if {
	not owed
	count(not_known) > 0
}

not_owed contains "exposure is not at or above the level for double protection now" if {
	not owed
	count(not_known) == 0
}

owed if common.any_current(input.exposed.double)

# Of a worker who is not known to be in the program, enrolment tells.
not_known := [stretch.reason |
	common.any_current(input.enrolled)
	some stretch in input.exposure_unknown.double
	common.covers(stretch, input.as_of)
]

verdict := {"holds": false, "note": "exposure is at or above the level for double protection, and no protector is at hand"} if {
	input.protection == null
} else := {"holds": true, "note": "an earplug and an earmuff are at hand"} if {
	"dual" in input.protection.types
} else := {"holds": true, "note": "an earplug and an earmuff are at hand"} if {
	count(at_hand({"formable", "premolded", "custom"})) > 0
	count(at_hand({"earmuff", "helmet_muff"})) > 0
} else := {
	"holds": null,
	"note": "the records do not say of every protector at hand whether it is a plug or a muff",
	"missing": ["the type of each protector at hand"],
} if {
	some type in input.protection.types
	type == null
} else := {
	"holds": false,
	"note": sprintf("exposure is at or above the level for double protection, and only this is at hand: %s", [common.in_words(input.protection.types)]),
}

at_hand(types) := [type | some type in input.protection.types; type in types]
