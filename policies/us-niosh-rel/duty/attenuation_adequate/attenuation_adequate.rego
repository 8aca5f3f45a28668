# METADATA
# title: Adequate attenuation (recommended)
# description: >-
#   The protector is to leave less than 85 dBA at the ear. Until January 2025 that was estimated from the noise
#   reduction rating (NRR) of the label, cut for real use: earmuffs by 25 %, formable earplugs by 50 %, other earplugs
#   by 70 %. Since then the level at the ear is the exposure less the personal attenuation rating (PAR) that a fit test
#   gave for this worker and this protector. Where a plug and a muff are worn together, the rating of one of them alone
#   can only show that it is enough.
# custom:
#   cite: NIOSH 98-126, 1.5, 6.4; science policy update of January 2025
#   subject: worker
#   topic: protectors
#   severity: minor
#   evidence: [protector_issue, protector, measurement, fit_test]
#   remedy: >-
#     Give the worker a protector with more attenuation, which a fit test shows to be enough, or lower the exposure.
package duty.attenuation_adequate

import data.common
import rego.v2

# Until January 2025: the rating of the label, derated by type of protector.

obligations contains {
	"value": input.protection.under_db,
	"below": "derated_target",
	"note": derated_said,
	"missing": [word | some word in input.protection.missing; input.protection.under_db == null],
	"because": [input.protection.ref, sprintf("protector/%s", [input.protection.protector])],
	"facts": {
		"protector": input.protection.protector,
		"exposure_dba": input.protection.exposure_dba,
		"method": input.protection.method,
		"working": input.protection.working,
	},
} if {
	has_protector
	derated
}

derated if common.at(data.parameters.derated_target, input.as_of) != null

derated_said := "the level under the protector cannot be estimated" if {
	input.protection.under_db == null
} else := "estimated level under the protector, with the derated rating"

# Since January 2025: the personal attenuation rating of a fit test.

obligations contains {
	"value": level,
	"below": "fit_tested_target",
	"note": said,
	"missing": missing,
	"because": common.refs([input.protection, input.protection.fit_test]),
	"facts": {
		"protector": input.protection.protector,
		"exposure_dba": input.protection.exposure_dba,
		"personal_attenuation_rating_db": input.protection.par_db,
	},
} if {
	has_protector
	not derated
	input.protection.fit_test != null
}

target := common.at(data.parameters.fit_tested_target, input.as_of)

# What the rating of one of two protectors leaves says nothing if it is too much.
level := null if {
	one_of_two_is_not_enough
} else := input.protection.under_par_db

one_of_two_is_not_enough if {
	count(input.protection.types) > 1
	common.any_current(input.exposed.double)
	input.protection.under_par_db != null
	input.protection.under_par_db >= target
}

said := "a plug and a muff are to be worn together, and the rating of one of them alone is on record" if {
	one_of_two_is_not_enough
} else := "the level at the ear is not known" if {
	input.protection.under_par_db == null
} else := "level at the ear by the personal attenuation rating"

missing := ["the personal attenuation rating of both protectors together"] if {
	one_of_two_is_not_enough
} else := ["the exposure, or the personal attenuation rating"] if {
	input.protection.under_par_db == null
} else := []

# When it is not asked.

not_owed contains "the records do not show exposure at or above the REL now" if not in_program_now

not_owed contains "no protector at hand, which is a finding of its own" if {
	in_program_now
	input.protection == null
}

not_owed contains "no fit test of the protector at hand, which is a finding of its own" if {
	has_protector
	not derated
	input.protection.fit_test == null
}

in_program_now if common.any_current(input.enrolled)

has_protector if {
	in_program_now
	input.protection != null
}
