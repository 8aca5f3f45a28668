# METADATA
# title: Personal sampling
# description: >-
#   Where workers move about, sound levels vary much or impulses matter, so that area monitoring is generally
#   unsuitable, representative personal sampling is used, unless the employer can show that area sampling gives
#   equivalent results.
# custom:
#   cite: 29 CFR 1910.95(d)(1)(ii)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [group, measurement, document]
#   remedy: Have workers of the group wear a dosimeter, or keep a paper that shows that area sampling gives equivalent results.
package duty.personal_sampling

import data.common
import rego.v2

obligations contains {"holds": true, "because": refs_of("personal")} if sampled("personal")

obligations contains {"holds": true, "because": common.refs(input.measurements)} if {
	without_personal
	input.varied == false
}

obligations contains {
	"lifted": "a paper shows that area sampling gives equivalent results",
	"cite": "29 CFR 1910.95(d)(1)(ii)",
	"because": common.refs(papers_of_equivalence),
} if {
	in_question
	count(papers_of_equivalence) > 0
}

obligations contains {
	"holds": false,
	"note": "area monitoring is generally unsuitable here and nobody wore an instrument",
	"because": common.refs(input.measurements),
	"facts": {"workers": input.workers},
} if {
	area_only
	input.varied == true
}

obligations contains {
	"holds": null,
	"note": "area monitoring is generally unsuitable here, and levels of tasks are the only others on record",
	"missing": ["whether the levels of tasks were sampled on the workers"],
	"because": refs_of("task"),
	"facts": {"workers": input.workers},
} if {
	in_question
	count(papers_of_equivalence) == 0
	sampled("task")
	input.varied == true
}

obligations contains {
	"holds": null,
	"note": "nobody wore an instrument, and nobody has said whether area monitoring suits the group",
	"missing": ["whether the workers move about, levels vary much or impulses matter"],
	"because": common.refs(input.measurements),
	"facts": {"workers": input.workers},
} if {
	in_question
	count(papers_of_equivalence) == 0
	input.varied == null
}

not_owed contains "no noise measurement of the group" if count(input.measurements) == 0

without_personal if {
	count(input.measurements) > 0
	not sampled("personal")
}

in_question if {
	without_personal
	input.varied != false
}

area_only if {
	in_question
	count(papers_of_equivalence) == 0
	not sampled("task")
}

sampled(kind) if {
	some measurement in input.measurements
	measurement.kind == kind
}

refs_of(kind) := [measurement.ref | some measurement in input.measurements; measurement.kind == kind]

papers_of_equivalence := [paper | some paper in input.documents; paper.kind == "area_sampling_equivalent"]
