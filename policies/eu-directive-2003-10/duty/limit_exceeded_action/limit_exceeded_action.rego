# METADATA
# title: Action after the limit was exceeded
# description: >-
#   If the limit is exceeded despite the measures, the employer reduces the exposure below it at once, finds out why
#   it was exceeded, and amends the measures so that it does not recur.
# custom:
#   cite: Directive 2003/10/EC Art 7(2)
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [document]
#   remedy: Reduce the exposure, find the reasons, amend the measures, and record all three.
package duty.limit_exceeded_action

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

not_owed contains "no record says that the limit was exceeded at an ear; whether it is, is a finding of each worker" if count(papers) == 0

papers := [paper | some paper in input.documents; paper.kind == "limit_exceeded"]

heads := common.at(data.parameters.limit_action_heads, input.as_of)

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

said := "the document does not say which heads it covers" if {
	hidden
} else := sprintf("after the limit was exceeded, no record shows: %s", [common.in_words(lacking)]) if {
	count(lacking) > 0
} else := null
