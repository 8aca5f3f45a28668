# METADATA
# title: Uncertainty of the measurement taken into account
# description: >-
#   When results are assessed, the inexactness of the measurement is taken into account in line with metrological
#   practice. The Directive does not say how a result near a value is to be decided.
# custom:
#   cite: Directive 2003/10/EC Art 4(5)
#   subject: group
#   topic: monitoring
#   severity: minor
#   evidence: [measurement, document]
#   remedy: Give the level with its accuracy class or uncertainty, and say how it was compared with the action values.
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
