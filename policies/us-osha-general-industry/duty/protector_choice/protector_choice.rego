# METADATA
# title: Choice of protectors
# description: >-
#   Employees may pick their protectors from a variety of suitable ones. The paragraph sets no number; two models, such as
#   a plug and a muff, are read as a variety.
# custom:
#   cite: 29 CFR 1910.95(i)(3)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [protector_issue]
#   remedy: Offer at least one more suitable model of another type and record how many there were to choose from.
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

not_owed contains "the records do not show exposure at or above the action level now" if not in_program_now

not_owed contains "no protector at hand, which is a finding of its own" if {
	in_program_now
	input.protection == null
}

said := "it is not known from how many models the worker could choose" if {
	input.protection.choices_offered == null
} else := "number of models to choose from"

in_program_now if common.any_current(input.enrolled)
