# METADATA
# title: Plug and muff together
# description: >-
#   If a miner's exposure during any work shift exceeds the dual hearing protection level, a TWA8 of 105 dBA or a dose of
#   800 percent, the operator provides, and ensures the use of, an ear plug and an ear muff together, beside all that is
#   owed above the permissible exposure level. Both are looked for among the protectors at hand; whether protectors are
#   worn is the matter of protectors-worn.
# custom:
#   cite: 30 CFR 62.140
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [protector_issue, protector, measurement]
#   remedy: Give the miner an ear plug and an ear muff, see to it that both are worn together, and record both issues.
package duty.dual_protection

import data.common
import rego.v2

obligations contains object.union(verdict, {"because": [input.protection.ref]}) if {
	owed
	input.protection != null
}

obligations contains {
	"holds": null,
	"note": sprintf("it is not known whether exposure is above the dual hearing protection level: %s", [concat("; ", not_known)]),
	"missing": ["an exposure that can be held against the dual hearing protection level"],
} if {
	not owed
	count(not_known) > 0
}

not_owed contains "exposure is not above the dual hearing protection level now" if {
	not owed
	count(not_known) == 0
}

not_owed contains "no protector at hand, which is a finding of its own" if {
	owed
	input.protection == null
}

owed if common.any_current(input.exposed.dual)

# Of a miner who is not known to be in the program, enrolment tells.
not_known := [stretch.reason |
	common.any_current(input.enrolled)
	some stretch in input.exposure_unknown.dual
	common.covers(stretch, input.as_of)
]

verdict := {"holds": true, "note": "an ear plug and an ear muff are at hand"} if {
	"dual" in input.protection.types
} else := {"holds": true, "note": "an ear plug and an ear muff are at hand"} if {
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
	"note": sprintf("exposure is above the dual hearing protection level, and only this is at hand: %s", [common.in_words(input.protection.types)]),
}

at_hand(types) := [type | some type in input.protection.types; type in types]
