# METADATA
# title: Initial noise assessment (recommended)
# description: >-
#   Where noise may reach the REL, an initial assessment of the exposure is made. The sheet of this bundle gives no time
#   for it.
# custom:
#   cite: NIOSH 98-126, 1.3.1 (from memory)
#   subject: group
#   topic: monitoring
#   severity: minor
#   evidence: [group, measurement, task]
#   remedy: >-
#     Have the exposure of the group measured over a representative shift, at 3 dB exchange, or record that nothing
#     suggests noise at the REL.
package duty.initial_assessment

import rego.v2

obligations contains {
	"holds": true,
	"on": input.first_survey.date,
	"because": [input.first_survey.ref],
	"facts": object.union(spread, {"doubts": doubts}),
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
	"missing": ["a dose, or a level over the shift, on the terms of the REL"],
	"facts": {"workers": input.workers, "measurements": count(input.measurements)},
} if {
	not surveyed
	input.suspected_noisy == true
	measured
}

obligations contains {
	"holds": null,
	"note": "the group was never surveyed and nobody has said whether it may be noisy",
	"missing": ["whether noise is suspected"],
	"facts": {"workers": input.workers},
} if {
	not surveyed
	input.suspected_noisy == null
}

not_owed contains "nothing suggests noise at the REL" if {
	not surveyed
	input.suspected_noisy == false
}

surveyed if input.first_survey != null

# For information: the statistics of the results that count now, and figures that cannot all be right.
default spread := {}

spread := object.union(
	object.remove(input.statistics, ["warnings"]),
	{"working": array.concat(input.statistics.working, input.statistics.warnings)},
) if {
	input.statistics != null
}

doubts := [sprintf("%s: %s", [measurement.id, doubt]) |
	some measurement in input.measurements
	some doubt in measurement.doubts
]

measured if count(input.measurements) > 0
