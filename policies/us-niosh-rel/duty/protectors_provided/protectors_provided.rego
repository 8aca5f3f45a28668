# METADATA
# title: Protectors provided (recommended)
# description: >-
#   Every worker at or above the REL is given hearing protectors free of charge, from the first day. Whether they cost
#   the worker anything is not in the records.
# custom:
#   cite: NIOSH 98-126, 1.5 (from memory)
#   subject: worker
#   topic: protectors
#   severity: minor
#   evidence: [protector_issue, measurement]
#   remedy: >-
#     Give the worker suitable protectors, free of charge, and record the issue.
package duty.protectors_provided

import data.common
import rego.v2

obligations contains {
	"key": spell.from,
	"after": spell.from,
	"by": spell.protector,
	"during": spell,
	"note": sprintf("exposure at or above the REL began on %s, so protectors are owed", [spell.from]),
	"because": [exposure.ref | some exposure in input.exposures; exposure.from == spell.from; exposure.ref != null],
} if {
	some spell in in_program_now
	not used_up(spell)
}

obligations contains {
	"key": spell.from,
	"holds": false,
	"note": "protectors were issued, but none is at hand now",
	"because": common.refs([spell.protector]),
} if {
	some spell in in_program_now
	used_up(spell)
}

not_owed contains "the records do not show exposure at or above the REL now" if count(in_program_now) == 0

in_program_now := [spell | some spell in input.enrolled; spell.current == true]

used_up(spell) if {
	spell.protector != null
	input.protection == null
}
