# METADATA
# title: Exposure of every employee known
# description: >-
#   The assessment shows whether each employee is likely to be exposed at or above a lower exposure action value. So
#   every employee belongs to a group whose exposure is known since the Regulations came into force, and nobody at or above an upper
#   exposure action value is left out of the programme.
# custom:
#   cite: Control of Noise at Work Regulations reg 5(2)
#   subject: worker
#   topic: monitoring
#   severity: major
#   evidence: [assignment, measurement, task]
#   remedy: Complete the assignments of the worker, or assess the levels of the group; take the worker into the programme.
package duty.exposure_assessed

import data.common
import rego.v2

obligations contains {
	"holds": false,
	"note": "exposure is at or above an upper exposure action value, but the employer's roll leaves the worker out of the programme",
	"facts": {"working": input.exposure_working},
	"because": array.concat([sprintf("worker/%s", [input.id])], deciding),
} if {
	left_out
}

obligations contains {
	"holds": null,
	"missing": ["an exposure that can be held against the lower exposure action values"],
	"note": sprintf("it is not known whether exposure reaches a lower exposure action value: %s", [concat("; ", reasons)]),
	"facts": {
		"not_known": [{"from": stretch.from, "to": stretch.to} | some stretch in unknown],
		"working": input.exposure_working,
	},
	"because": deciding,
} if {
	not left_out
	count(unknown) > 0
}

obligations contains {
	"holds": true,
	"note": "the records show for the whole time whether exposure reaches a lower exposure action value",
	"facts": {"stretches_at_or_above_it": count(input.exposed.lower), "working": input.exposure_working},
	"because": deciding,
} if {
	not left_out
	count(unknown) == 0
}

left_out if {
	input.on_roll == false
	common.any_current(input.exposed.upper)
}

# The Regulations do not ask about the time before they came into force.
unknown := [stretch | some stretch in input.exposure_unknown.lower; not before_the_law(stretch)]

before_the_law(stretch) if {
	stretch.to != null
	stretch.to <= data.parameters.lower_action_value.values[0].from
}

reasons := sort({stretch.reason | some stretch in unknown; stretch.reason != null})

deciding := sort({exposure.ref | some exposure in input.exposures; exposure.ref != null})

# The employer has to know of everybody: there is nobody of whom this is not asked.
not_owed := set()
