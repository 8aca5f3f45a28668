# METADATA
# title: Register kept for ten years
# description: >-
#   What is entered in the register, the reports of measurements among it, is kept for at least ten years and is
#   available to the authority, the workers and their representatives, the committee and the responsible physician.
# custom:
#   cite: r. 13, s. 141.5
#   subject: site
#   topic: records
#   severity: major
#   evidence: [measurement, notice, task]
#   remedy: Find the record of the measurement and keep it with the others; measure again if it cannot be found.
package duty.register_kept

import data.common
import rego.v2

obligations contains {
	"key": lost.id,
	"holds": false,
	"on": lost.date,
	"for": "register_retention",
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
	concerned
	input.measurements > 0
}

obligations contains {
	"key": "on file",
	"holds": null,
	"note": "workers are above a limit and no measurement is on record",
	"missing": ["the exposure measurements of the site"],
	"facts": {"workers_above_a_limit": input.enrolled_now},
} if {
	concerned
	input.measurements == 0
}

not_owed contains "nobody is known to have been above a limit" if {
	not concerned
	count(input.missing_measurements) == 0
}

concerned if input.enrolled_ever > 0
