# METADATA
# title: Records of assessments kept
# description: >-
#   The record of an assessment is kept: until 30 March 2023 as long as the employer operated in Alberta, since then
#   for at least three years. A copy is given to affected workers and officers on request.
# custom:
#   cite: OHS Code, s. 220(2)
#   subject: site
#   topic: records
#   severity: major
#   evidence: [measurement, notice]
#   remedy: Find the record of the measurement and keep it with the others; measure again if it cannot be found.
package duty.assessment_kept

import data.common
import rego.v2

obligations contains object.union(lasting(lost), {
	"key": lost.id,
	"holds": false,
	"note": sprintf("another record refers to the measurement %s, which is not in the records", [lost.id]),
	"because": [lost.ref],
	"facts": {"measurement": lost.id, "referred_to_on": lost.date},
}) if {
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

not_owed contains "no record speaks of a measurement" if {
	input.measurements == 0
	count(input.missing_measurements) == 0
}

# Of records from before the three years came into force these count from that day at the earliest.
lasting(lost) := {"on": max([lost.date, since]), "for": "assessment_retention"} if {
	common.at(data.parameters.assessment_retention, input.as_of) != null
} else := {"on": lost.date}

since := min([period.from | some period in data.parameters.assessment_retention.values])
