# METADATA
# title: Protectors provided
# description: >-
#   A hearing protector is provided to every miner whose exposure equals or exceeds the action level, with replacements
#   as necessary. The section sets no time: it is owed from the first day.
# custom:
#   cite: 30 CFR 62.160(a), (a)(4)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [protector_issue, measurement]
#   remedy: Give the miner hearing protectors, free of charge, and record the issue.
package duty.protectors_provided

import data.common
import rego.v2

obligations contains {
	"key": spell.from,
	"after": spell.from,
	"by": spell.protector,
	"during": spell,
	"note": sprintf("exposure at or above the action level began on %s, so protectors are owed", [spell.from]),
	"because": [exposure.ref | some exposure in input.exposures; exposure.from == spell.from],
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

not_owed contains "the records do not show exposure at or above the action level now" if count(in_program_now) == 0

in_program_now := [spell | some spell in input.enrolled; spell.current == true]

used_up(spell) if {
	spell.protector != null
	input.protection == null
}
