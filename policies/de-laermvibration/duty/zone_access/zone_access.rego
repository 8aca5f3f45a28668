# METADATA
# title: Noise areas fenced off
# description: >-
#   Noise areas are fenced off, where that is technically possible.
# custom:
#   cite: LärmVibrationsArbSchV § 7(4) sentence 1
#   subject: area
#   topic: controls
#   severity: minor
#   evidence: [document]
#   remedy: Fence the area off, or record why that is not technically possible.
package duty.zone_access

import data.common
import rego.v2

# Where it is technically not possible, a document that says so answers the question.
obligations contains {
	"key": "now",
	"ask": "Is the noise area fenced off, or is that technically not possible?",
	"of": "safety professional",
	"by": latest,
	"facts": {"workers": input.workers},
} if {
	upper_exceeded_now
}

not_owed contains "the records do not show exposure above the upper action values now" if not upper_exceeded_now

upper_exceeded_now if common.any_current(input.exposed.upper_exceeded)

papers := [paper | some paper in input.documents; paper.kind in {"access_restriction", "zone_plan"}]

# Documents come oldest first.
latest := null if {
	count(papers) == 0
} else := {"date": paper.date, "ref": paper.ref} if {
	some paper in [papers[count(papers) - 1]]
}
