# METADATA
# title: Variety of protectors (recommended)
# description: >-
#   Workers choose from a variety of protectors. No number is known to be set; two models, such as a plug and a muff,
#   are read as a variety.
# custom:
#   cite: NIOSH 98-126, 1.5 (from memory)
#   subject: worker
#   topic: protectors
#   severity: minor
#   evidence: [protector_issue]
#   remedy: >-
#     Offer at least one more suitable model of another type and record how many there were to choose from.
package duty.protector_choice

import data.common
import rego.v2

obligations contains {
	"value": input.protection.choices_offered,
	"at_least": "protector_variety",
	"on": input.protection.date,
	"note": said,
	"missing": common.missing(input.protection.choices_offered, "the number of models offered"),
	"because": [input.protection.ref],
	"facts": {"protector": input.protection.protector},
} if {
	in_program_now
	input.protection != null
}

not_owed contains "the records do not show exposure at or above the REL now" if not in_program_now

not_owed contains "no protector at hand, which is a finding of its own" if {
	in_program_now
	input.protection == null
}

said := "it is not known from how many models the worker could choose" if {
	input.protection.choices_offered == null
} else := "number of models to choose from"

in_program_now if common.any_current(input.enrolled)
