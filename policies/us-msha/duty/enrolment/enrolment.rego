# METADATA
# title: Who is in the program
# description: >-
#   If a miner's noise exposure during any work shift equals or exceeds the action level, a TWA8 of 85 dBA or a dose of
#   50 percent without regard to protectors, the operator enrols the miner in a hearing conservation program. One work
#   shift is enough. So every miner's exposure must be known, and nobody who is exposed at or above the action level may
#   be left out.
# custom:
#   cite: 30 CFR 62.120, 62.110(a)
#   subject: worker
#   topic: enrolment
#   severity: major
#   evidence: [assignment, measurement, task]
#   remedy: >-
#     Enrol a miner who is exposed at or above the action level. Where exposure is not known, measure it over a full shift
#     with the settings that the law asks for, or complete the miner's assignments.
package duty.enrolment

import data.common
import rego.v2

obligations contains {
	"holds": false,
	"note": "exposure is at or above the action level, but the employer's roll leaves the miner out of the program",
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
