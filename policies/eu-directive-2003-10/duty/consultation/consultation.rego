# METADATA
# title: Workers consulted
# description: >-
#   Workers or their representatives are consulted and take part, above all in the assessment of risks and the choice
#   of measures, in the actions against noise, and in the choice of protectors.
# custom:
#   cite: Directive 2003/10/EC Art 9
#   subject: site
#   topic: information
#   severity: minor
#   evidence: [document]
#   remedy: Consult the workers or their representatives on what lacks, and record it.
package duty.consultation

import data.common
import rego.v2

obligations contains {
	"holds": covered,
	"note": said,
	"missing": [words | hidden; words := "which heads the document covers"],
	"because": common.refs(papers),
	"facts": {"heads_asked_for": heads, "heads_not_covered": lacking},
} if {
	in_noise
}

not_owed contains "nobody has been at or above the lower action values" if not in_noise

in_noise if input.enrolled_ever > 0

papers := [paper | some paper in input.documents; paper.kind == "consultation"]

heads := common.at(data.parameters.consultation_heads, input.as_of)

# Several documents of the kind add up.
lacking := sort({head | some head in heads} - common.covered(papers))

hidden if heads == null

hidden if {
	count(papers) > 0
	every paper in papers {
		count(paper.covers) == 0
	}
}

covered := false if {
	count(papers) == 0
} else := null if {
	hidden
} else := count(lacking) == 0

said := "no consultation of the workers or their representatives is on record" if {
	count(papers) == 0
} else := "the record does not say on what the workers were consulted" if {
	hidden
} else := sprintf("the workers were not consulted on: %s", [common.in_words(lacking)]) if {
	count(lacking) > 0
} else := null
