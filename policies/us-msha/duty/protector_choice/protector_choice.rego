# METADATA
# title: Choice of protectors
# description: >-
#   The miner chooses a hearing protector from at least two types of muff and two types of plug; where dual protection is
#   required, one of each.
# custom:
#   cite: 30 CFR 62.160(a)(2)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [protector_issue]
#   remedy: Offer at least two types of muff and two types of plug, let the miner choose, and record how many of each there were.
package duty.protector_choice

import data.common
import rego.v2

obligations contains {
	"key": "plugs",
	"value": input.protection.plugs_offered,
	"at_least": "plug_types",
	"on": input.protection.date,
	"note": "types of earplug to choose from",
	"missing": common.missing(input.protection.plugs_offered, "the number of types of earplug offered"),
	"because": [input.protection.ref],
} if {
	has_protector
}

obligations contains {
	"key": "muffs",
	"value": input.protection.muffs_offered,
	"at_least": "muff_types",
	"on": input.protection.date,
	"note": "types of earmuff to choose from",
	"missing": common.missing(input.protection.muffs_offered, "the number of types of earmuff offered"),
	"because": [input.protection.ref],
} if {
	has_protector
}

not_owed contains "the records do not show exposure at or above the action level now" if not in_program_now

not_owed contains "no protector at hand, which is a finding of its own" if {
	in_program_now
	input.protection == null
}

has_protector if {
	in_program_now
	input.protection != null
}

in_program_now if common.any_current(input.enrolled)
