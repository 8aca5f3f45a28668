# METADATA
# title: Conditions of a determination
# description: >-
#   A dose determination reflects the miner's full work shift; integrates all sound levels over the range of the level
#   that it is for, 80 to at least 130 dBA for the action level, 90 to at least 140 dBA for the permissible exposure
#   level and the dual hearing protection level; and uses A-weighting and slow response. Criterion level and exchange
#   rate decide whether a dose counts at all. A measurement that was repeated with the right settings is left alone.
# custom:
#   cite: 30 CFR 62.110(b)(2)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [measurement]
#   remedy: >-
#     Measure again over the full shift, slow, with one dose from 80 to at least 130 dBA and one from 90 to at least 140
#     dBA, and record threshold, upper end and response.
package duty.measurement_conditions

import data.common
import rego.v2

obligations contains {
	"key": sprintf("%s/full shift", [measurement.id]),
	"holds": full_shift(measurement),
	"on": measurement.date,
	"note": sprintf("the determination of %s %s", [measurement.date, said_of_shift[full_shift(measurement)]]),
	"missing": common.missing(full_shift(measurement), "whether the sample covers the full shift"),
	"because": [measurement.ref],
} if {
	some measurement in determinations
}

obligations contains {
	"key": sprintf("%s/response", [measurement.id]),
	"holds": slow(measurement),
	"on": measurement.date,
	"note": sprintf("response of the determination of %s: %s", [measurement.date, said_of_response(measurement)]),
	"missing": common.missing(slow(measurement), "the response of the instrument"),
	"because": [measurement.ref],
} if {
	some measurement in determinations
}

obligations contains object.union(range_of(dose, measurement), {
	"key": sprintf("%s/%v dBA/upper end", [measurement.id, dose.threshold_db]),
	"on": measurement.date,
	"note": sprintf("upper end of the range of the dose of %s that begins at %v dBA", [measurement.date, dose.threshold_db]),
	"missing": common.missing(dose.upper_db, "the upper end of the range"),
	"because": [measurement.ref],
}) if {
	some measurement in determinations
	some dose in measurement.doses
	dose.threshold_db != null
}

# A dose that begins above 80 dBA is no determination for the action level; for the other levels it begins at 90 dBA.
obligations contains {
	"key": sprintf("%s/%v dBA/threshold", [measurement.id, dose.threshold_db]),
	"value": dose.threshold_db,
	"at_most": "limit_range_floor",
	"on": measurement.date,
	"note": sprintf("integration threshold of a dose of %s", [measurement.date]),
	"missing": common.missing(dose.threshold_db, "the integration threshold"),
	"because": [measurement.ref],
} if {
	some measurement in determinations
	some dose in measurement.doses
	not for_action_level(dose, measurement)
}

not_owed contains "no noise dose on record" if count(determinations) == 0

determinations := [measurement |
	some measurement in input.measurements
	measurement.dosed == true
	not measurement.repeated
]

full_shift(measurement) if {
	measurement.full_shift == null
	measurement.reaches_enrolling != null # run time and length of the shift are on record and agree
} else := measurement.full_shift

said_of_shift := {true: "reflects the full shift", false: "does not reflect the full shift", null: "does not say whether it reflects the full shift"}

slow(measurement) := null if {
	measurement.method == null
} else := measurement.method in common.at(data.parameters.response, measurement.date)

said_of_response(measurement) := "not recorded" if {
	measurement.method == null
} else := measurement.method

for_action_level(dose, measurement) if {
	dose.threshold_db != null
	dose.threshold_db <= common.at(data.parameters.action_range_floor, measurement.date)
}

range_of(dose, measurement) := {"value": dose.upper_db, "at_least": "action_range_top"} if {
	for_action_level(dose, measurement)
} else := {"value": dose.upper_db, "at_least": "limit_range_top"}
