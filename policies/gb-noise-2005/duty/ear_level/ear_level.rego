# METADATA
# title: Level at the ear (guidance)
# description: >-
#   Guidance, not law. A protector brings the level at the ear below the upper exposure action value; a level below
#   70 dB(A) is over-protection, which isolates the worker, hides warnings and tempts to take the protector off. The
#   level is estimated with the allowance for use in the real world.
# custom:
#   cite: HSE L108, selection of protectors; HSE, Avoiding over-protection (guidance)
#   subject: worker
#   topic: protectors
#   severity: minor
#   evidence: [protector_issue, protector, measurement]
#   remedy: Choose a protector whose attenuation fits the noise.
package duty.ear_level

import data.common
import rego.v2

obligations contains object.union(estimate, {"key": "enough", "below": "ear_level_ceiling"}) if {
	at_upper
	input.protection != null
}

obligations contains object.union(estimate, {"key": "not too much", "at_least": "ear_level_floor"}) if {
	at_upper_level
	input.protection != null
	input.protection.under_db != null
}

not_owed contains "exposure is not known to be at or above an upper exposure action value" if not at_upper

not_owed contains "no protector at hand, which is a finding of its own" if {
	at_upper
	input.protection == null
}

at_upper if common.any_current(input.exposed.upper)

# Over-protection is a matter of the level; peaks alone do not show it.
at_upper_level if common.any_current(input.exposed.upper_level)

estimate := {
	"value": input.protection.under_db,
	"note": "estimated level at the ear",
	"missing": [word | some word in input.protection.missing; input.protection.under_db == null],
	"because": [input.protection.ref, sprintf("protector/%s", [input.protection.protector])],
	"facts": {
		"protector": input.protection.protector,
		"exposure_dba": input.protection.exposure_dba,
		"method": input.protection.method,
		"working": input.protection.working,
		"formula": input.protection.mark,
	},
}
