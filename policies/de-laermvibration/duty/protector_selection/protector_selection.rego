# METADATA
# title: Choice of protectors
# description: >-
#   Protectors are chosen so that their use removes the risk to hearing or reduces it to a minimum.
# custom:
#   cite: LärmVibrationsArbSchV § 8(2) sentence 1
#   subject: group
#   topic: protectors
#   severity: minor
#   evidence: [document]
#   remedy: Record for which noise the protectors of the group were chosen, and why.
package duty.protector_selection

import data.common
import rego.v2

obligations contains {
	"holds": count(papers) > 0,
	"note": said,
	"because": common.refs(papers),
	"facts": {"workers": input.workers, "with_protectors": input.protector_holders},
} if {
	lower_exceeded_now
	input.protector_holders > 0
}

not_owed contains "the records do not show exposure above the lower action values now" if not lower_exceeded_now

not_owed contains "nobody in the group has a protector at hand, which is a finding of each worker" if {
	lower_exceeded_now
	input.protector_holders == 0
}

lower_exceeded_now if common.any_current(input.exposed.lower_exceeded)

papers := [paper | some paper in input.documents; paper.kind == "protector_selection"]

said := "no record shows how the protectors of the group were chosen" if count(papers) == 0

else := null
