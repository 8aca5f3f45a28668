# METADATA
# title: Evaluation every five years
# description: >-
#   Each workplace situation in which a limit is exceeded is evaluated every five years, to find reasonable means. A
#   situation that was above the limit on 16 June 2023 is evaluated for the first time within a year of that day.
# custom:
#   cite: r. 13, s. 133
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement, document]
#   remedy: Evaluate the workplace situation now to find reasonable means, and file the dated evaluation.
package duty.situation_evaluated

import data.common
import rego.v2

obligations contains {
	"every": "evaluation_interval",
	"first": first_time(stretch),
	"during": stretch,
	"by": "document.noise_evaluation",
} if {
	some stretch in stretches
}

not_owed contains "the situation is not known to have been above a limit since the section came into force" if count(stretches) == 0

commencement := min([period.from | some period in data.parameters.sections_in_force.values])

# The parts of the stretches above a limit for which the section has been in force.
stretches := [{"from": max([spell.from, commencement]), "to": spell.to} |
	some spell in input.exposed.limit
	spell.from <= input.as_of
	not common.over(spell, commencement)
	input.as_of >= commencement
]

first_time(stretch) := "first_identification_time" if {
	stretch.from == commencement
	not early_counts
} else := "evaluation_interval"

early_counts if {
	input.choices.early_evaluation == "counted"
	some evaluation in input.evaluations
	evaluation.early
}
