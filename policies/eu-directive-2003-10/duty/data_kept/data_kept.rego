# METADATA
# title: Data kept
# description: >-
#   The data obtained from the assessment and measurement are preserved in a suitable form, so that they can be
#   consulted later. The Directive names no number of years.
# custom:
#   cite: Directive 2003/10/EC Art 4(4)
#   subject: site
#   topic: records
#   severity: major
#   evidence: [measurement, notice]
#   remedy: Find the record of the measurement and keep it with the others; measure again if it cannot be found.
package duty.data_kept

import data.common
import rego.v2

obligations contains {
	"key": lost.id,
	"holds": false,
	"on": lost.date,
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
	input.measurements > 0
}

not_owed contains "nothing was measured, and no record refers to a measurement" if {
	input.measurements == 0
	count(input.missing_measurements) == 0
}
