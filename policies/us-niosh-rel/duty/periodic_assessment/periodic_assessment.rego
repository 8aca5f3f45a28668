# METADATA
# title: Periodic noise assessment (recommended)
# description: >-
#   While any worker is at or above the REL, the assessment of exposure is repeated at least every two years. The clock
#   starts with the first result, and again with each measurement.
# custom:
#   cite: NIOSH 98-126, 1.3.2 (from memory)
#   subject: group
#   topic: monitoring
#   severity: minor
#   evidence: [measurement]
#   remedy: >-
#     Measure the exposure of the group again now.
package duty.periodic_assessment

import rego.v2

obligations contains {
	"every": "assessment_interval",
	"during": {"from": first_day(spell), "to": spell.to},
	"by": "measurement.any",
	"facts": {"workers": input.workers},
} if {
	some spell in known
}

not_owed contains "the group is not known to have been at or above the REL since its first result" if count(known) == 0

# What a result says of the time before it asks for no earlier assessment.
known := [spell | some spell in input.exposed.rel; input.first_survey != null; not over_before(spell)]

over_before(spell) if {
	spell.to != null
	spell.to <= input.first_survey.date
}

first_day(spell) := max([spell.from, input.first_survey.date])
