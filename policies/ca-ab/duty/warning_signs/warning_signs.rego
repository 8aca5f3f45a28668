# METADATA
# title: Warning signs
# description: >-
#   Clear warning signs stand at the periphery of areas whose noise is above the limits. From memory.
# custom:
#   cite: OHS Code, ss. 219 to 222, section not known
#   subject: area
#   topic: information
#   severity: minor
#   evidence: [document, measurement]
#   remedy: Post warning signs at the periphery of the area, and keep a dated photo or checklist.
package duty.warning_signs

import data.common
import rego.v2

obligations contains {
	"holds": count(signs) > 0,
	"note": note,
	"because": common.refs(signs),
	"facts": {"workers": input.workers},
} if {
	above
}

not_owed contains "the area is not known to be above the limits now" if not above

above if common.any_current(input.exposed.limit)

# Signs that are up: those taken down again do not count.
signs := [paper | some paper in input.documents; paper.kind == "zone_signs"; up(paper)]

up(paper) if paper.posted_to == null

up(paper) if {
	paper.posted_to != null
	paper.posted_to >= input.as_of
}

note := "no record shows warning signs for the area" if {
	count(signs) == 0
} else := null
