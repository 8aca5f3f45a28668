# METADATA
# title: Standard posted
# description: >-
#   Copies of the standard are available to affected employees or their representatives, and a copy is posted in the
#   workplace.
# custom:
#   cite: 29 CFR 1910.95(l)(1)
#   subject: site
#   topic: information
#   severity: minor
#   evidence: [document]
#   remedy: Post a copy of 29 CFR 1910.95 where affected workers see it, and keep a dated photo or checklist.
package duty.standard_posted

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"because": common.refs(postings),
	"facts": {"workers_in_program": input.enrolled_now},
} if {
	affected
	count(postings) > 0
}

obligations contains {
	"holds": false,
	"note": "no record shows that the standard is posted",
	"facts": {"workers_in_program": input.enrolled_now},
} if {
	affected
	count(postings) == 0
}

not_owed contains "nobody has been at or above the action level" if not affected

affected if input.enrolled_ever > 0

postings := [paper | some paper in input.documents; paper.kind == "standard_posted"]
