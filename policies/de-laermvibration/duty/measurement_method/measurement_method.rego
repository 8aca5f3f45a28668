# METADATA
# title: Measurements by the state of the art
# description: >-
#   Measurements follow the state of the art: methods and devices suit the workplace and the noise, and allow it to be
#   decided whether the action values are kept. A sample may be taken that is representative of a worker's exposure.
# custom:
#   cite: LärmVibrationsArbSchV § 4(1)
#   subject: group
#   topic: monitoring
#   severity: minor
#   evidence: [document, measurement]
#   remedy: Keep with the result a report on the method, the device and what the sample stands for.
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
