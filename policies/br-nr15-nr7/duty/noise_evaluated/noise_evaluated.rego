# METADATA
# title: Noise evaluated
# description: >-
#   When noise is identified in the preliminary analysis of the work, exposure is evaluated quantitatively where
#   that is needed to prove control, to size the exposure or to support controls. The text sets no interval.
# custom:
#   cite: NR-9 9.4.2 (secondary source)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [group, measurement, task]
#   remedy: >-
#     Measure the exposure of the group over a representative day, or record that nothing suggests noise there.
package duty.noise_evaluated

import rego.v2

obligations contains {
	"holds": true,
	"on": input.first_survey.date,
	"because": [input.first_survey.ref],
	"facts": {"workers": input.workers},
} if {
	surveyed
}

obligations contains {
	"holds": false,
	"note": "noise is suspected and the group was never measured",
	"facts": {"workers": input.workers},
} if {
	not surveyed
	suspected
	count(input.measurements) == 0
}

obligations contains {
	"holds": null,
	"note": "the group was measured, but no result gives its dose",
	"missing": ["a dose with criterion level 85 dB(A) and 5 dB exchange rate, or the levels and times of a day"],
	"facts": {"workers": input.workers, "measurements": count(input.measurements)},
} if {
	not surveyed
	suspected
	count(input.measurements) > 0
}

obligations contains {
	"holds": null,
	"note": "the group was never measured and nobody has said whether it may be noisy",
	"missing": ["whether noise is suspected"],
	"facts": {"workers": input.workers},
} if {
	not surveyed
	not suspected
	input.suspected_noisy == null
}

not_owed contains "nothing suggests noise" if {
	not surveyed
	not suspected
	input.suspected_noisy == false
}

surveyed if input.first_survey != null

suspected if input.suspected_noisy == true

suspected if input.impulsive == true
