# METADATA
# title: Monitoring started
# description: >-
#   When information suggests that any employee may be exposed at or above the action level, the employer develops and
#   carries out a monitoring program. The paragraph sets no time for it.
# custom:
#   cite: 29 CFR 1910.95(d)(1)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [group, measurement, task]
#   remedy: Measure the group's exposure over a representative shift, or record that nothing suggests noise at the action level.
package duty.monitoring_started

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
	"missing": ["a dose, or a level over the shift, on the terms of this law"],
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

not_owed contains "nothing suggests noise at the action level" if {
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
