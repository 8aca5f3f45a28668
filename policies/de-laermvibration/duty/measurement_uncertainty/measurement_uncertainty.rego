# METADATA
# title: Accuracy class of the level (guidance)
# description: >-
#   The daily level is compared with the action values with the margin of its accuracy class: 0, 3 or 6 dB. A level
#   without a class, an uncertainty or a report that covers it cannot be compared in this way.
# custom:
#   cite: TRLV Lärm 2 §§ 8-9
#   subject: group
#   topic: monitoring
#   severity: minor
#   evidence: [measurement, document]
#   remedy: Record the accuracy class of the level, or let the report cover its uncertainty.
package duty.measurement_uncertainty

import data.common
import rego.v2

obligations contains {
	"holds": answer,
	"note": said,
	"missing": [words | answer == null; words := "how inexact the level of the group is: an accuracy class, an uncertainty, or a report that covers it"],
	"because": array.concat(common.refs(reports), common.refs(current)),
} if {
	count(current) > 0
}

not_owed contains "no measured level describes the group as it is" if count(current) == 0

# A sample of several days or tasks brings its uncertainty with it.
answer if {
	uncertainty_known
} else := false if {
	count(covered) > 0
} else := null

uncertainty_known if {
	every measurement in current {
		measurement.accuracy_class != null
	}
}

uncertainty_known if input.now.channels.day.u_db != null

uncertainty_known if "uncertainty" in covered

current := [measurement |
	some measurement in input.measurements
	measurement.current == true
	measurement.levelled == true
]

reports := [paper | some paper in input.documents; paper.kind == "noise_measurement_report"]

covered := common.covered(reports)

said := null if {
	answer == true
} else := "the report of the measurement does not cover its uncertainty" if {
	answer == false
} else := "the level was compared with the action values as if it were exact"
