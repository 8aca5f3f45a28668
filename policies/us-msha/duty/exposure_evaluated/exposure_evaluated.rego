# METADATA
# title: Exposure evaluated
# description: >-
#   The operator's system of monitoring evaluates each miner's noise exposure sufficiently to determine continuing
#   compliance with Part 62: a group in which noise is suspected is measured. The paragraph sets no time for it.
# custom:
#   cite: 30 CFR 62.110(a)-(b)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [group, measurement, task]
#   remedy: Measure the group's exposure over a full shift, or record that nothing suggests noise at the action level.
package duty.exposure_evaluated

import rego.v2

obligations contains {
	"holds": true,
	"on": input.first_survey.date,
	"because": [input.first_survey.ref],
} if {
	surveyed
}

obligations contains {
	"holds": false,
	"note": "noise is suspected and the group was never measured",
	"facts": {"workers": input.workers},
} if {
	not surveyed
	input.suspected_noisy == true
	not measured
}

obligations contains {
	"holds": null,
	"note": "the group was measured, but no result gives its exposure",
	"missing": ["a dose over the full shift with 90 dB criterion level and 5 dB exchange rate"],
	"facts": {"workers": input.workers, "measurements": count(input.measurements)},
} if {
	not surveyed
	input.suspected_noisy == true
	measured
}

obligations contains {
	"holds": null,
	"note": "the group was never measured and nobody has said whether it may be noisy",
	"missing": ["whether noise is suspected"],
	"facts": {"workers": input.workers},
} if {
	not surveyed
	input.suspected_noisy == null
}

not_owed contains "nothing suggests noise at the action level" if {
	not surveyed
	input.suspected_noisy == false
}

surveyed if input.first_survey != null

measured if count(input.measurements) > 0
