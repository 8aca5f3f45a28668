# METADATA
# title: Workplaces marked
# description: >-
#   Workplaces where workers may be exposed above the upper action values are marked with appropriate signs.
# custom:
#   cite: Directive 2003/10/EC Art 5(3)
#   subject: area
#   topic: controls
#   severity: major
#   evidence: [document, measurement]
#   remedy: Mark the area with signs and record it.
package duty.zone_signs

import data.common
import rego.v2

obligations contains {
	"holds": count(papers) > 0,
	"note": said,
	"because": common.refs(papers),
	"facts": {"workers": input.workers},
} if {
	upper_exceeded_now
}

not_owed contains "the records do not show exposure above the upper action values now" if not upper_exceeded_now

upper_exceeded_now if common.any_current(input.exposed.upper_exceeded)

papers := [paper | some paper in input.documents; paper.kind == "zone_signs"]

said := "no record shows that the area is marked with signs" if count(papers) == 0

else := null
