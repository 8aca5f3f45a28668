# METADATA
# title: Noise exposure assessed
# description: >-
#   Where workers are or may be exposed above 82 dBA Lex, until 30 March 2023 above 85 dBA Lex, a noise exposure
#   assessment is made by CSA Z107.56.
# custom:
#   cite: OHS Code, s. 219(1)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [group, measurement, task]
#   remedy: Assess the exposure of the group by CSA Z107.56, or record that nothing suggests noise above the level.
package duty.noise_assessed

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"on": input.first_survey.date,
	"because": [input.first_survey.ref],
	"facts": {"workers": input.workers},
} if {
	surveyed
	count(not_known_now) == 0
}

obligations contains {
	"holds": null,
	"note": sprintf("it is not known whether the exposure is above the level: %s", [concat("; ", not_known_now)]),
	"missing": ["a daily level, Lex, by equal energy"],
	"facts": {"workers": input.workers, "measurements": count(input.measurements)},
} if {
	measured
	count(not_known_now) > 0
}

obligations contains {
	"holds": false,
	"note": "noise is suspected and the group was never measured",
	"facts": {"workers": input.workers},
} if {
	not measured
	input.suspected_noisy == true
}

obligations contains {
	"holds": null,
	"note": "the group was never measured and nobody has said whether it may be noisy",
	"missing": ["whether noise is suspected"],
	"facts": {"workers": input.workers},
} if {
	not measured
	input.suspected_noisy == null
}

not_owed contains "nothing suggests noise above the level of assessment" if {
	not measured
	input.suspected_noisy == false
}

surveyed if input.first_survey != null

measured if surveyed

measured if count(input.measurements) > 0

not_known_now := common.reasons(input.exposure_unknown.assessment, input.as_of)
