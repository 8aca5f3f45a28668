# METADATA
# title: Daily level measured
# description: >-
#   In a workplace situation with a risk of exceeding a limit the daily exposure level is measured by ISO 9612 or CSA
#   Z107.56. That measuring is needed was read in the authority's notice; the section number is from memory.
# custom:
#   cite: r. 13, s. 141
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [group, measurement, task]
#   remedy: Measure the daily exposure level of the situation, or record that nothing suggests noise at the limit.
package duty.situation_measured

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"on": first.date,
	"because": [first.ref],
	"facts": {"workers": input.workers},
} if {
	measured
	count(not_known_now) == 0
}

obligations contains {
	"holds": null,
	"note": sprintf("it is not known whether a limit is exceeded: %s", [concat("; ", not_known_now)]),
	"missing": ["a daily level, L_EX,8h, by equal energy"],
	"facts": {"workers": input.workers, "measurements": count(input.measurements)},
} if {
	count(not_known_now) > 0
	measured
}

obligations contains {
	"holds": false,
	"note": "noise is suspected and the situation was never measured",
	"facts": {"workers": input.workers},
} if {
	not measured
	in_force
	input.suspected_noisy == true
}

obligations contains {
	"holds": null,
	"note": "the situation was never measured and nobody has said whether it may be noisy",
	"missing": ["whether noise is suspected"],
	"facts": {"workers": input.workers},
} if {
	not measured
	in_force
	input.suspected_noisy == null
}

not_owed contains "nothing suggests a risk of exceeding a limit" if {
	not measured
	input.suspected_noisy == false
}

not_owed contains "the section was not in force yet" if {
	not measured
	not in_force
}

in_force if common.at(data.parameters.sections_in_force, input.as_of) != null

measured if first

# The first result, or a sample that leaves the level only within bounds.
first := input.first_survey if {
	input.first_survey != null
} else := input.measurements[0]

not_known_now := common.reasons(input.exposure_unknown.limit, input.as_of)
