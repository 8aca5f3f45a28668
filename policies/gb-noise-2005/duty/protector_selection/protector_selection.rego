# METADATA
# title: Protectors selected for the noise
# description: >-
#   Hearing protectors made available or provided are selected so as to eliminate the risk to hearing, or to reduce
#   it to as low a level as is reasonably practicable. A record of the selection shows that their attenuation was
#   held against the noise.
# custom:
#   cite: Control of Noise at Work Regulations reg 7(4)
#   subject: group
#   topic: protectors
#   severity: major
#   evidence: [protector_issue, document]
#   remedy: Hold the attenuation of the protectors against the noise of the group, and record the selection.
package duty.protector_selection

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": sprintf("the latest selection is of %s", [papers[count(papers) - 1].date]),
	"because": common.refs(papers),
	"facts": {"workers_with_protectors": input.protector_holders},
} if {
	exposed
	input.protector_holders > 0
	count(papers) > 0
}

obligations contains {
	"holds": false,
	"note": "workers have protectors, and no record shows how they were selected for the noise",
	"facts": {"workers_with_protectors": input.protector_holders},
} if {
	exposed
	input.protector_holders > 0
	count(papers) == 0
}

not_owed contains "the group is not known to be at or above a lower exposure action value" if not exposed

not_owed contains "nobody in the group has a protector" if {
	exposed
	input.protector_holders == 0
}

exposed if common.any_current(input.exposed.lower)

papers := [paper | some paper in input.documents; paper.kind in ["protector_selection", "attenuation_evaluation"]]
