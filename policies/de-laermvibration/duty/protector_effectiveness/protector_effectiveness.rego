# METADATA
# title: State of protectors checked
# description: >-
#   The state of the protectors chosen is checked at regular intervals. The ordinance names no figure.
# custom:
#   cite: LärmVibrationsArbSchV § 8(4) sentence 1
#   subject: group
#   topic: protectors
#   severity: minor
#   evidence: [document]
#   remedy: Check the state of the protectors in use, and record it.
package duty.protector_effectiveness

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

papers := [paper | some paper in input.documents; paper.kind in {"attenuation_evaluation", "protector_maintenance"}]

said := "no check of the protectors of the group is on record" if count(papers) == 0

else := null
