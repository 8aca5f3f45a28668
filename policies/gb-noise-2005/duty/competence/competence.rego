# METADATA
# title: Competence of those who carry out the duties
# description: >-
#   Whoever carries out work in connection with the duties of the employer under the Regulations, an employee or
#   not, has suitable and sufficient information, instruction and training.
# custom:
#   cite: Control of Noise at Work Regulations reg 10(4)
#   subject: site
#   topic: training
#   severity: minor
#   evidence: [document]
#   remedy: Keep on file what qualifies those who assess noise, choose protectors, train and run the surveillance.
package duty.competence

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "the competence of those who carry out the duties is on file",
	"because": common.refs(papers),
	"facts": {"workers_at_or_above_lower_value": input.enrolled_now},
} if {
	exposed
	count(papers) > 0
}

obligations contains {
	"holds": false,
	"note": "no record shows the competence of those who carry out the duties",
	"facts": {"workers_at_or_above_lower_value": input.enrolled_now},
} if {
	exposed
	count(papers) == 0
}

not_owed contains "nobody is known to be at or above a lower exposure action value" if not exposed

exposed if "lower" in input.levels_now

papers := [paper | some paper in input.documents; paper.kind == "competence"]
