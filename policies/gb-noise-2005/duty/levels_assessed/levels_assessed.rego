# METADATA
# title: Levels assessed
# description: >-
#   In the risk assessment the employer assesses the levels of noise by observing work practices, by information on
#   the probable levels of the equipment and, if necessary, by measurement, so that it can be decided whether any
#   employee is likely to be exposed at or above the action values or above a limit value. Levels of tasks serve as
#   well as measurements.
# custom:
#   cite: Control of Noise at Work Regulations reg 5(2)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [measurement, task]
#   remedy: Assess the levels of the group from tasks and equipment, or measure them, so that they can be held against every value.
package duty.levels_assessed

import data.common
import rego.v2

obligations contains {
	"holds": false,
	"note": "neither a measurement nor levels of tasks are on record for this group, whose work is suspected to be noisy",
	"facts": {"workers": input.workers},
} if {
	concerned
	not assessed
}

obligations contains {
	"holds": null,
	"note": sprintf("the levels cannot be held against every value: %s", [concat("; ", not_known)]),
	"missing": ["levels that can be held against the action values and the limit value"],
	"facts": {"workers": input.workers},
} if {
	concerned
	assessed
	count(not_known) > 0
}

obligations contains {
	"holds": true,
	"note": "the records show where the group stands to the action values and the limit value",
	"because": common.refs([input.first_survey]),
	"facts": {"workers": input.workers},
} if {
	concerned
	assessed
	count(not_known) == 0
}

not_owed contains "nothing suggests noise at a lower exposure action value" if not concerned

concerned if input.suspected_noisy == true

concerned if assessed

assessed if {
	some found in [input.first_survey, input.task_day]
	found != null
}

not_known := sort({stretch.reason |
	some level in ["lower", "upper", "limit"]
	some stretch in input.exposure_unknown[level]
	common.covers(stretch, input.as_of)
})
