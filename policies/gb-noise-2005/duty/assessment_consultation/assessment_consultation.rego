# METADATA
# title: Consultation on the risk assessment
# description: >-
#   The employer consults the employees concerned or their representatives on the assessment of risk.
# custom:
#   cite: Control of Noise at Work Regulations reg 5(5)
#   subject: site
#   topic: information
#   severity: minor
#   evidence: [document]
#   remedy: Consult the employees concerned or their representatives on the risk assessment, and record it with what it was about.
package duty.assessment_consultation

import data.common
import rego.v2

obligations contains object.union(verdict, {"facts": {"workers_at_or_above_lower_value": input.enrolled_now}}) if exposed

verdict := {"holds": true, "note": "employees or their representatives were consulted on the risk assessment", "because": common.refs(covering)} if {
	count(covering) > 0
} else := {
	"holds": null,
	"note": "a record of the kind does not say what it covers",
	"missing": ["what the record covers"],
	"because": common.refs(silent),
} if {
	count(silent) > 0
} else := {"holds": false, "note": "no record shows that employees or their representatives were consulted on the risk assessment"}

not_owed contains "nobody is known to be at or above a lower exposure action value" if not exposed

exposed if "lower" in input.levels_now

papers := [paper | some paper in input.documents; paper.kind == "consultation"]

covering := [paper | some paper in papers; "assessment" in paper.covers]

silent := [paper | some paper in papers; count(paper.covers) == 0]
