# METADATA
# title: Grave and imminent risk of impact noise
# description: >-
#   Activities with impact noise above 140 dB measured unweighted with an impulse detector, or above 130 dB(C)
#   measured fast, without adequate protection hold a grave and imminent risk (risco grave e iminente). Whether
#   protection is adequate is a judgement.
# custom:
#   cite: NR-15 Annex 2 item 4
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement, protector_issue, document]
#   remedy: >-
#     Stop the work until everybody there is adequately protected; have the protection evaluated by a competent
#     person and keep the evaluation.
package duty.impact_grave_risk

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
	"note": "impact noise was measured and holds no grave and imminent risk",
	"because": [input.now.ref],
	"facts": facts,
} if {
	channel != null
	not above
}

not_owed contains "no level of impact noise is on record, which is a finding of its own where impacts occur" if channel == null

found := sprintf("impact noise of %v dB is above the level of grave and imminent risk", [measured])

# What an impulse detector measured decides; where there was none, the C-weighted level taken fast.
channel := "impulse" if {
	known("grave_impulse")
} else := "fast" if {
	known("grave_fast")
} else := null

level_of := {"impulse": "grave_impulse", "fast": "grave_fast"}

known(level) if {
	input.now != null
	count([stretch | some stretch in input.exposure_unknown[level]; common.covers(stretch, input.as_of)]) == 0
}

above if {
	channel != null
	some stretch in input.exposed[level_of[channel]]
	stretch.current
}

limit_of := {"impulse": "impulse_grave_risk", "fast": "impact_grave_risk_fast"}

measured := input.now.channels[channel].at_least

facts := {
	"measured_with": {"impulse": "impulse detector, unweighted", "fast": "C-weighted, fast"}[channel],
	"level_db": measured,
	"limit_db": common.at(data.parameters[limit_of[channel]], input.as_of),
	"workers": input.workers,
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
