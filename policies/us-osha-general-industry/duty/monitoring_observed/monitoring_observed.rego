# METADATA
# title: Observation of monitoring
# description: >-
#   Affected employees or their representatives are given an opportunity to observe any measurement of noise. It is asked
#   for as long as the record of the measurement must be kept.
# custom:
#   cite: 29 CFR 1910.95(f)
#   subject: group
#   topic: monitoring
#   severity: minor
#   evidence: [measurement]
#   remedy: Invite the workers or their representatives to the next measurement and record the invitation.
package duty.monitoring_observed

import data.common
import rego.v2

obligations contains {
	"key": measurement.id,
	"holds": measurement.observers_invited,
	"on": measurement.date,
	"for": "noise_record_retention",
	"note": said[measurement.observers_invited],
	"missing": common.missing(measurement.observers_invited, "whether workers or their representatives could observe"),
	"because": [measurement.ref],
} if {
	some measurement in input.measurements
}

not_owed contains "no noise measurement of the group" if count(input.measurements) == 0

said := {
	true: null,
	false: "neither the workers nor their representatives could observe",
	null: "the record does not say whether the workers could observe",
}
