# METADATA
# title: Observation of monitoring
# description: >-
#   The operator gives affected miners and their representatives an opportunity to observe the noise exposure
#   monitoring, and gives prior notice of its date and time. It is asked of every measurement that describes the group
#   as it is.
# custom:
#   cite: 30 CFR 62.110(c)
#   subject: group
#   topic: monitoring
#   severity: minor
#   evidence: [measurement]
#   remedy: Tell the affected miners and their representatives date and time of the next measurement beforehand, let them observe, and record it.
package duty.monitoring_observed

import data.common
import rego.v2

obligations contains {
	"key": measurement.id,
	"holds": measurement.observers_invited,
	"on": measurement.date,
	"note": said[measurement.observers_invited],
	"missing": common.missing(measurement.observers_invited, "whether miners or their representatives were told and could observe"),
	"because": [measurement.ref],
} if {
	some measurement in input.measurements
	measurement.current
}

not_owed contains "no noise measurement describes the group as it is" if {
	every measurement in input.measurements { not measurement.current }
}

said := {
	true: null,
	false: "neither the miners nor their representatives could observe",
	null: "the record does not say whether the miners were told and could observe",
}
