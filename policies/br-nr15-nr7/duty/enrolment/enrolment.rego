# METADATA
# title: Who is to be tested
# description: >-
#   All employees who work, or are going to work, where the noise is above the action level stated in the risk
#   management programme (PGR) undergo reference and sequential audiometric exams, whatever protector they wear.
#   So everybody's exposure must be known, and nobody above the action level may be left out.
# custom:
#   cite: NR-7 Annex II item 2
#   subject: worker
#   topic: enrolment
#   severity: major
#   evidence: [assignment, measurement, task, worker]
#   remedy: >-
#     Put a worker above the action level into the programme. Where exposure is not known, measure it, or complete
#     the assignments.
package duty.enrolment

import data.common
import rego.v2

obligations contains {
	"holds": false,
	"note": "exposure is above the action level, but the employer's roll leaves the worker out",
	"facts": {"exposed_since": common.current_since(input.enrolled), "working": input.exposure_working},
	"because": array.concat([sprintf("worker/%s", [input.id])], deciding),
} if {
	left_out
}

obligations contains {
	"holds": null,
	"missing": ["an exposure that can be held against the action level"],
	"note": sprintf("it is not known whether exposure is above the action level: %s", [concat("; ", reasons)]),
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
	"note": "the records show for the whole time whether exposure is above the action level",
	"facts": {"stretches_above": count(input.enrolled), "working": input.exposure_working},
	"because": deciding,
} if {
	not left_out
	count(unknown) == 0
}

exposed_now if common.any_current(input.enrolled)

left_out if {
	input.on_roll == false
	exposed_now
}

# Of the time before there was an action level nobody asks.
unknown := [stretch | some stretch in input.exposure_unknown.action; not before_the_law(stretch)]

before_the_law(stretch) if {
	stretch.to != null
	stretch.to <= data.parameters.action_dose.values[0].from
}

reasons := sort({stretch.reason | some stretch in unknown; stretch.reason != null})

deciding := sort({exposure.ref | some exposure in input.exposures; exposure.ref != null})

# The employer has to know of everybody.
not_owed := set()
