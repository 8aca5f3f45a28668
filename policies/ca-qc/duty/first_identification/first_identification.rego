# METADATA
# title: First identification of situations at risk
# description: >-
#   Within one year of 16 June 2023 the employer identifies for the first time the workplace situations in which there
#   is a risk of exceeding a limit. The entry is in the register or the prevention program; an evaluation of the
#   situations holds it, too.
# custom:
#   cite: O.C. 781-2021, transitional provision
#   subject: site
#   topic: monitoring
#   severity: major
#   evidence: [document]
#   remedy: Identify the workplace situations at risk now, and enter each with its date in the register.
package duty.first_identification

import data.common
import rego.v2

obligations contains {
	"after": commencement,
	"within": "first_identification_time",
	"by": ["document.noise_register", "document.noise_evaluation"],
	"note": note,
	"because": common.refs(earlier),
} if {
	input.as_of >= commencement
}

not_owed contains "the section was not in force yet" if input.as_of < commencement

commencement := min([period.from | some period in data.parameters.sections_in_force.values])

earlier := [paper |
	some paper in input.documents
	paper.kind in ["noise_register", "noise_evaluation"]
	paper.date < commencement
]

note := "what was identified before the section came into force was held against the former limits" if {
	count(earlier) > 0
} else := null
