# METADATA
# title: Exposure records kept (recommended)
# description: >-
#   Records of exposure measurements are kept for 30 years. A measurement that other records refer to, but that is not
#   there, was not kept.
# custom:
#   cite: NIOSH 98-126, 1.10 (from memory)
#   subject: site
#   topic: records
#   severity: minor
#   evidence: [measurement, notice, task]
#   remedy: >-
#     Find the record of the measurement and keep it with the others; measure again if it cannot be found.
package duty.noise_records_kept

import data.common
import rego.v2

obligations contains {
	"key": lost.id,
	"holds": false,
	"on": lost.date,
	"for": "noise_record_retention",
	"note": sprintf("another record refers to the measurement %s, which is not in the records", [lost.id]),
	"because": [lost.ref],
	"facts": {"measurement": lost.id},
} if {
	some lost in input.missing_measurements
}

obligations contains {
	"key": "on file",
	"holds": true,
	"because": common.refs([input.latest_measurement]),
	"facts": {"measurements": input.measurements},
} if {
	in_program
	input.measurements > 0
}

obligations contains {
	"key": "on file",
	"holds": null,
	"note": "workers are in the program and no measurement is on record",
	"missing": ["the exposure measurements of the site"],
	"facts": {"workers_in_program": input.enrolled_now},
} if {
	in_program
	input.measurements == 0
}

not_owed contains "nobody has been at or above the REL" if {
	not in_program
	count(input.missing_measurements) == 0
}

in_program if input.enrolled_ever > 0
