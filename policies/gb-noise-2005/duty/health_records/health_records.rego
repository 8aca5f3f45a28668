# METADATA
# title: Health records kept
# description: >-
#   For every employee under health surveillance a health record is made and maintained, and kept available in a
#   suitable form. It holds outcomes, no clinical data.
# custom:
#   cite: Control of Noise at Work Regulations reg 9(2)
#   subject: site
#   topic: records
#   severity: major
#   evidence: [document]
#   remedy: Make a health record for everybody under surveillance, apart from medical records, and record where it is kept.
package duty.health_records

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "health records are kept",
	"because": common.refs(papers),
	"facts": {"workers_at_or_above_lower_value": input.enrolled_now},
} if {
	exposed
	count(papers) > 0
}

obligations contains {
	"holds": false,
	"note": "no record shows that health records are kept",
	"facts": {"workers_at_or_above_lower_value": input.enrolled_now},
} if {
	exposed
	count(papers) == 0
}

not_owed contains "nobody is known to be at or above an upper exposure action value" if not exposed

exposed if "upper" in input.levels_now

papers := [paper | some paper in input.documents; paper.kind == "health_records"]
