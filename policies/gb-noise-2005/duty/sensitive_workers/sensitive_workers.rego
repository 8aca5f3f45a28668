# METADATA
# title: Employees at particular risk
# description: >-
#   The employer adapts the measures to take account of any employee, or group of employees, whose health is likely
#   to be particularly at risk from noise.
# custom:
#   cite: Control of Noise at Work Regulations reg 6(6)
#   subject: site
#   topic: controls
#   severity: minor
#   evidence: [document]
#   remedy: Find out who is particularly at risk and adapt the measures to them; record the plans, or that nobody is.
package duty.sensitive_workers

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "how the measures are adapted to those at particular risk is on record",
	"because": common.refs(papers),
	"facts": {"workers_at_or_above_lower_value": input.enrolled_now},
} if {
	exposed
	count(papers) > 0
}

obligations contains {
	"holds": false,
	"note": "no record shows who is particularly at risk and how the measures are adapted to them, or that nobody is",
	"facts": {"workers_at_or_above_lower_value": input.enrolled_now},
} if {
	exposed
	count(papers) == 0
}

not_owed contains "nobody is known to be at or above a lower exposure action value" if not exposed

exposed if "lower" in input.levels_now

papers := [paper | some paper in input.documents; paper.kind == "sensitive_workers"]
