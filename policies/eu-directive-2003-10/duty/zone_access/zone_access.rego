# METADATA
# title: Marked areas delimited
# description: >-
#   Marked areas are delimited and access to them is restricted, where that is technically feasible and the risk of
#   exposure justifies it.
# custom:
#   cite: Directive 2003/10/EC Art 5(3)
#   subject: area
#   topic: controls
#   severity: minor
#   evidence: [document]
#   remedy: Delimit the area and restrict access, or record why that is not feasible or not justified.
package duty.zone_access

import data.common
import rego.v2

# Where it is not feasible or not justified, a document that says so answers the question.
obligations contains {
	"key": "now",
	"ask": "Is the area delimited and access to it restricted, or is that not feasible or not justified by the risk?",
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
