# METADATA
# title: No exposure above the ceiling without adequate protection
# description: >-
#   Nobody is exposed to levels above 115 dB(A) without adequate protection; activities with continuous or
#   intermittent noise above it without adequate protection hold a grave and imminent risk (risco grave e
#   iminente). Whether protection is adequate is a judgement.
# custom:
#   cite: NR-15 Annex 1 items 5 and 7
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement, protector_issue, document]
#   remedy: >-
#     Stop the work above the ceiling until everybody there is adequately protected; have the protection evaluated
#     by a competent person and keep the evaluation.
package duty.continuous_ceiling

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"because": array.concat([input.now.ref], common.refs(evaluations)),
	"facts": facts,
}) if {
	above
}

obligations contains {
	"holds": true,
	"note": "no level above the ceiling was measured",
	"because": [input.now.ref],
	"facts": facts,
} if {
	not above
	measured
}

obligations contains {
	"holds": null,
	"note": "the group is above the tolerance limit and its highest level is not on record",
	"missing": ["the highest continuous level, A-weighted, slow"],
	"facts": {"workers": input.workers},
} if {
	not above
	not measured
	above_limit
}

not_owed contains "the group is not above the tolerance limit, and no level above the ceiling is on record" if {
	not above
	not measured
	not above_limit
}

above if common.any_current(input.exposed.ceiling)

measured if {
	input.now != null
	input.now.channels.continuous.at_most != null
}

above_limit if common.any_current(input.exposed.limit)

found := sprintf("the highest level measured, %v dB(A), is above the ceiling", [input.now.channels.continuous.at_least])

facts := {
	"highest_dba": input.now.channels.continuous.at_least,
	"ceiling_dba": common.at(data.parameters.continuous_ceiling, input.as_of),
	"workers": input.workers, "protector_holders": input.protector_holders,
}

# Without a note of how well the protectors protect, nobody can say that protection is adequate: an engineer is asked.
verdict := {"holds": false, "note": sprintf("%s, and %d of %d workers of the group have no protector on record", [found, input.workers - input.protector_holders, input.workers])} if {
	input.protector_holders < input.workers
} else := {"holds": true, "on": evaluations[0].date, "note": sprintf("%s; all workers have protectors, and their protection was evaluated", [found])} if {
	count(evaluations) > 0
} else := {
	"ask": "Do the protectors protect adequately at this level?",
	"of": "occupational safety engineer or physician",
	"note": sprintf("%s, all workers have protectors, and no evaluation of their protection is on record", [found]),
}

# Evaluations of the protectors since the measurement that counts.
evaluations := [document |
	some document in input.documents
	document.kind == "attenuation_evaluation"
	document.date >= input.now.measured_on
]
