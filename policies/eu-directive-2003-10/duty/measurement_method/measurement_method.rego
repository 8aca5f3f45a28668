# METADATA
# title: Method of the measurement on record
# description: >-
#   Methods and apparatus suit the conditions, above all the characteristics of the noise, the length of exposure,
#   ambient factors and the apparatus; a sample stands for the personal exposure of a worker.
# custom:
#   cite: Directive 2003/10/EC Art 4(2)-(3)
#   subject: group
#   topic: monitoring
#   severity: minor
#   evidence: [document, measurement]
#   remedy: Keep with the result a report on the method, the instrument and what the sample stands for.
package duty.measurement_method

import data.common
import rego.v2

obligations contains {
	"holds": count(papers) > 0,
	"note": said,
	"because": array.concat(common.refs(papers), common.refs(current)),
	"facts": {"measurements": count(current)},
} if {
	count(current) > 0
}

not_owed contains "no measurement describes the group as it is" if count(current) == 0

current := [measurement | some measurement in input.measurements; measurement.current == true]

papers := [paper | some paper in input.documents; paper.kind == "noise_measurement_report"]

said := "the group was measured, and no report shows method, instrument and what the sample stands for" if count(papers) == 0

else := null
