# METADATA
# title: Who belongs in the program (recommended)
# description: >-
#   NIOSH recommends a hearing loss prevention program for every worker whose exposure, as an 8-hour time-weighted
#   average, equals or exceeds the recommended exposure limit (REL) of 85 dBA, without regard to protectors. So the
#   exposure of every worker is to be known, and nobody at or above the REL is left out.
# custom:
#   cite: NIOSH 98-126, 1.1, 1.2
#   subject: worker
#   topic: enrolment
#   severity: minor
#   evidence: [assignment, measurement, task]
#   remedy: >-
#     Put the worker into the program. Where exposure is not known, measure it at 3 dB exchange, or complete the worker's
#     assignments.
package duty.enrolment

import data.common
import rego.v2

obligations contains {
	"holds": false,
	"note": "exposure is at or above the REL, but the employer's roll leaves the worker out of the program",
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
	"missing": ["an exposure that can be held against the REL"],
	"note": sprintf("it is not known whether exposure reaches the REL: %s", [concat("; ", reasons)]),
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
	"note": "the records show for the whole time whether exposure reaches the REL",
	"facts": {"stretches_in_program": count(input.enrolled), "working": input.exposure_working},
	"because": deciding,
} if {
	not left_out
	count(unknown) == 0
}

# Whoever is exposed at or above the REL today belongs in the program, whatever the roll says.
left_out if {
	input.on_roll == false
	common.any_current(input.enrolled)
}

unknown := input.exposure_unknown.rel

reasons := sort({stretch.reason | some stretch in unknown; stretch.reason != null})

deciding := sort({exposure.ref | some exposure in input.exposures; exposure.ref != null})

# The employer has to know of everybody: there is nobody of whom this is not asked.
not_owed := set()
