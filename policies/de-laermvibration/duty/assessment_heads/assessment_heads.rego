# METADATA
# title: What the risk assessment covers
# description: >-
#   The assessment covers eight heads (a) to (h), and beside them joint effects with ototoxic substances and
#   vibration, effects through warning signals, and work that asks for high concentration.
# custom:
#   cite: LärmVibrationsArbSchV § 3(2) no 1, (3)
#   subject: group
#   topic: monitoring
#   severity: minor
#   evidence: [document]
#   remedy: Complete the assessment by the heads that it lacks.
package duty.assessment_heads

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

not_owed contains "no risk assessment is on record, which is a finding of its own where one is owed" if count(papers) == 0

papers := [paper | some paper in input.documents; paper.kind == "risk_assessment"]

heads := common.at(data.parameters.documented_heads, input.as_of)

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
} else := sprintf("the risk assessment does not cover: %s", [common.in_words(lacking)]) if {
	count(lacking) > 0
} else := null
