# METADATA
# title: Who is in the program
# description: >-
#   The employer runs a continuing, effective hearing conservation program whenever employee noise exposures equal or
#   exceed the action level, an 8-hour time-weighted average of 85 dBA or a dose of 50 percent, computed without
#   regard to protectors. One day of such exposure is enough. So every worker's exposure must be known, and
#   nobody who is exposed at or above the action level may be left out of the program.
# custom:
#   cite: 29 CFR 1910.95(c)(1)
#   subject: worker
#   topic: enrolment
#   severity: major
#   evidence: [assignment, measurement, task]
#   remedy: >-
#     Put a worker who is exposed at or above the action level into the program. Where exposure is not known, measure
#     it with the settings that the law asks for, or complete the worker's assignments.
package duty.enrolment

import data.common
import rego.v2

obligations contains {
	"holds": false,
	"note": "exposure is at or above the action level, but the employer's roll leaves the worker out of the program",
	"facts": {
		"exposed_since": common.current_since(input.enrolled),
		"working": input.exposure_working,
	},
	"because": array.concat([sprintf("worker/%s", [input.id])], deciding),
} if {
	left_out
}

obligations contains {
	"holds": null,
	"missing": ["an exposure that can be held against the action level"],
	"note": sprintf("it is not known whether exposure reaches the action level: %s", [concat("; ", reasons)]),
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
	"note": "the records show for the whole time whether exposure reaches the action level",
	"facts": {"stretches_in_program": count(input.enrolled), "working": input.exposure_working},
	"because": deciding,
} if {
	not left_out
	count(unknown) == 0
}

# Whoever is exposed at or above the action level today belongs in the program, whatever the roll says.
left_out if {
	input.on_roll == false
	common.any_current(input.enrolled)
}

unknown := input.exposure_unknown.action

reasons := sort({stretch.reason | some stretch in unknown; stretch.reason != null})

deciding := sort({exposure.ref | some exposure in input.exposures; exposure.ref != null})

# The employer has to know of everybody: there is nobody of whom this is not asked.
not_owed := set()
