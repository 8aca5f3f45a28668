# METADATA
# title: Noise areas marked
# description: >-
#   Areas in which one of the upper action values may be exceeded are marked as noise areas (Lärmbereiche).
# custom:
#   cite: LärmVibrationsArbSchV § 7(4) sentence 1
#   subject: area
#   topic: controls
#   severity: major
#   evidence: [document, measurement]
#   remedy: Mark the area as a noise area and record it.
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
