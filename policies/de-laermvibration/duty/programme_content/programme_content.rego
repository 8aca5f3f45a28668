# METADATA
# title: What the programme holds (guidance)
# description: >-
#   The noise reduction programme has a list of priorities, a timetable and a check of effectiveness.
# custom:
#   cite: TRLV Lärm 1 § 9(3)
#   subject: group
#   topic: controls
#   severity: minor
#   evidence: [document]
#   remedy: Complete the programme by what it lacks.
package duty.programme_content

import data.common
import rego.v2

obligations contains {
	"holds": covered,
	"note": said,
	"missing": [words | hidden; words := "which heads the document covers"],
	"because": common.refs(papers),
	"facts": {"heads_asked_for": heads, "heads_not_covered": lacking},
} if {
	count(papers) > 0
}

not_owed contains "no programme is on record, which is a finding of its own where one is owed" if count(papers) == 0

papers := [paper | some paper in input.documents; paper.kind == "control_programme"]

heads := common.at(data.parameters.programme_heads, input.as_of)

# Several documents of the kind add up.
lacking := sort({head | some head in heads} - common.covered(papers))

hidden if heads == null

hidden if {
	count(papers) > 0
	every paper in papers {
		count(paper.covers) == 0
	}
}

covered := null if {
	hidden
} else := count(lacking) == 0

said := "the programme on record does not say what it holds" if {
	hidden
} else := sprintf("the programme does not hold: %s", [common.in_words(lacking)]) if {
	count(lacking) > 0
} else := null
