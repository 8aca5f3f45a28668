# METADATA
# title: Tolerance limit of impact noise
# description: >-
#   Impact noise (peaks of energy of less than one second at intervals of more than one second) does not exceed
#   130 dB measured unweighted with an impulse detector or, where there is none, 120 dB(C) measured fast. The
#   noise between the impacts is judged as continuous noise.
# custom:
#   cite: NR-15 Annex 2 items 1 to 3
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement, group]
#   remedy: >-
#     Bring the impacts down at their source, then measure again with an impulse detector, or C-weighted and fast.
package duty.impact_limit

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "impact noise was measured and is not above its limit",
	"because": [input.now.ref],
	"facts": facts,
} if {
	channel != null
	not above
}

obligations contains {
	"holds": false,
	"note": sprintf("impact noise of %v dB is above its limit", [measured]),
	"because": [input.now.ref],
	"facts": facts,
} if {
	above
}

obligations contains {
	"holds": null,
	"note": "the noise holds impacts and no level of them is on record",
	"missing": ["the level of the impacts by impulse detector, or C-weighted and fast"],
	"facts": {"workers": input.workers},
} if {
	channel == null
	input.impulsive == true
}

obligations contains {
	"holds": null,
	"note": "noise is suspected and nobody has said whether it holds impacts",
	"missing": ["whether impact noise occurs, or its level"],
	"facts": {"workers": input.workers},
} if {
	channel == null
	input.impulsive == null
	input.suspected_noisy != false
}

not_owed contains "no impact noise occurs" if {
	channel == null
	input.impulsive == false
}

not_owed contains "nothing suggests noise" if {
	channel == null
	input.impulsive == null
	input.suspected_noisy == false
}

# What an impulse detector measured decides; where there was none, the C-weighted level taken fast.
channel := "impulse" if {
	known("impulse")
} else := "fast" if {
	known("impact_fast")
} else := null

level_of := {"impulse": "impulse", "fast": "impact_fast"}

known(level) if {
	input.now != null
	count([stretch | some stretch in input.exposure_unknown[level]; common.covers(stretch, input.as_of)]) == 0
}

above if {
	channel != null
	some stretch in input.exposed[level_of[channel]]
	stretch.current
}

limit_of := {"impulse": "impulse_limit", "fast": "impact_limit_fast"}

measured := input.now.channels[channel].at_least

facts := {
	"measured_with": {"impulse": "impulse detector, unweighted", "fast": "C-weighted, fast"}[channel],
	"level_db": measured,
	"limit_db": common.at(data.parameters[limit_of[channel]], input.as_of),
	"workers": input.workers,
}
