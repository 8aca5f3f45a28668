# METADATA
# title: Protectors only in the three cases
# description: >-
#   Protectors or a shorter exposure stand in for other means only (a) while a reasonable means is being put in place,
#   (b) while equipment or a machine is repaired or maintained, or (c) where the limits cannot be met. The cases are
#   from a secondary source. A means that was found reasonable and is not in place yet shows case (a); a study that
#   found none shows case (c); a document may name the case.
# custom:
#   cite: r. 13, s. 136
#   subject: group
#   topic: protectors
#   severity: minor
#   evidence: [control, document, protector_issue]
#   remedy: Record which of the three cases lets protectors stand in, or put a reasonable means in place.
package duty.protectors_allowed

import data.common
import rego.v2

obligations contains {
	"key": "case",
	"ask": "In which of the three cases do protectors stand in for other means here?",
	"of": "competent person (engineering)",
	"by": shown,
	"because": common.refs(input.controls),
	"facts": {"workers": input.workers, "with_protectors": input.protector_holders},
} if {
	rely_on_protectors
}

not_owed contains "the situation is not above a limit now, or nobody in it has protectors" if not rely_on_protectors

rely_on_protectors if {
	input.protector_holders > 0
	common.any_current(input.exposed.limit)
}

shown := {"date": papers[0][0], "ref": papers[0][1]} if {
	count(papers) > 0
} else := {"date": pending[0][0], "ref": pending[0][1]} if {
	count(pending) > 0
} else := {"date": none_found[0][0], "ref": none_found[0][1]} if {
	count(none_found) > 0
} else := null

papers := sort([[paper.date, paper.ref] |
	some paper in input.documents
	paper.kind == "limit_exceeded"
	some word in paper.covers
	word in common.at(data.parameters.protector_cases, input.as_of)
])

pending := sort([[control.date, control.ref] |
	some control in input.controls
	control.feasible == "yes"
	control.installed_on == null
])

none_found := sort([[control.date, control.ref] | some control in input.controls; control.feasible == "no"])
