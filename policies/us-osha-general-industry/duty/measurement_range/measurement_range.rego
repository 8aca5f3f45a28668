# METADATA
# title: Range of the measurement
# description: >-
#   All continuous, intermittent and impulsive sound from 80 to 130 dB is integrated into the measurement: the
#   instrument's threshold is no higher than 80 dB and its range reaches 130 dB.
# custom:
#   cite: 29 CFR 1910.95(d)(2)(i)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [measurement]
#   remedy: Measure again with the dosimeter set to a threshold of 80 dBA and a range up to 130 dBA, and record both settings.
package duty.measurement_range

import data.common
import rego.v2

obligations contains {
	"key": sprintf("%s/threshold", [measurement.id]),
	"value": measurement.threshold_db,
	"at_most": "integration_floor",
	"on": measurement.date,
	"note": said(measurement.threshold_db, "integration threshold", measurement.date),
	"missing": common.missing(measurement.threshold_db, "the integration threshold"),
	"because": [measurement.ref],
	"facts": {"instrument": measurement.instrument},
} if {
	some measurement in doses
}

obligations contains {
	"key": sprintf("%s/upper end", [measurement.id]),
	"value": measurement.upper_db,
	"at_least": "integration_top",
	"on": measurement.date,
	"note": said(measurement.upper_db, "upper end of the range", measurement.date),
	"missing": common.missing(measurement.upper_db, "the upper end of the range"),
	"because": [measurement.ref],
	"facts": {"instrument": measurement.instrument},
} if {
	some measurement in doses
}

said(setting, what, day) := sprintf("the record of the dose of %s does not give the %s", [day, what]) if {
	setting == null
} else := sprintf("%s of the dose of %s", [what, day])

not_owed contains "no noise dose on record" if count(doses) == 0

# A dose that was taken again with the right range decides nothing any more.
doses := [measurement |
	some measurement in input.measurements
	measurement.dosed == true
	not measurement.repeated
]
