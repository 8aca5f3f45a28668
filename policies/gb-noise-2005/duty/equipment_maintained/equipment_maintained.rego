# METADATA
# title: Protectors and controls maintained
# description: >-
#   Anything provided under the Regulations, protectors as well as other measures, is kept in an efficient state, in
#   efficient working order and in good repair.
# custom:
#   cite: Control of Noise at Work Regulations reg 8(1)(b)
#   subject: site
#   topic: protectors
#   severity: major
#   evidence: [document]
#   remedy: Keep a maintenance log of protectors and noise controls, and repair or replace what is worn or broken.
package duty.equipment_maintained

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "the maintenance of what is provided is on record",
	"because": common.refs(papers),
	"facts": {"workers_at_or_above_lower_value": input.enrolled_now},
} if {
	exposed
	count(papers) > 0
}

obligations contains {
	"holds": false,
	"note": "no record shows that protectors and noise controls are maintained",
	"facts": {"workers_at_or_above_lower_value": input.enrolled_now},
} if {
	exposed
	count(papers) == 0
}

not_owed contains "nobody is known to be at or above a lower exposure action value" if not exposed

exposed if "lower" in input.levels_now

papers := [paper | some paper in input.documents; paper.kind == "protector_maintenance"]
