# METADATA
# title: Ceiling of 140 dBA (recommended)
# description: >-
#   Nobody is exposed to continuous, varying, intermittent or impulsive noise above 140 dBA. The highest level on record
#   is taken, slow. Where the noise holds impulses, that level does not show them, and the peak level is asked for
#   beside it; records hold peaks with weighting C or unweighted, and these are held against the same number.
# custom:
#   cite: NIOSH 98-126, 1.1.4
#   subject: group
#   topic: controls
#   severity: minor
#   evidence: [measurement, group]
#   remedy: >-
#     Stop work in such noise until the source is controlled, and measure again; where impulses occur, measure the peak.
package duty.noise_ceiling

import data.common
import rego.v2

obligations contains {
	"key": measurement.id,
	"value": measurement.max_dba,
	"at_most": "noise_ceiling",
	"on": measurement.date,
	"note": said(measurement, measurement.max_dba, "highest level"),
	"missing": common.missing(measurement.max_dba, "the highest level"),
	"because": [measurement.ref],
	"facts": {"workers": input.workers},
} if {
	some measurement in noisy
}

obligations contains {
	"key": sprintf("%s/peak", [measurement.id]),
	"value": measurement.peak_db,
	"at_most": "peak_ceiling",
	"on": measurement.date,
	"note": said(measurement, measurement.peak_db, "peak level"),
	"missing": common.missing(measurement.peak_db, "the peak level"),
	"because": [measurement.ref],
	"facts": {"workers": input.workers, "weighting": measurement.peak_weighting},
} if {
	some measurement in noisy
	peak_matters(measurement)
}

not_owed contains "no highest or peak level on record, and no measurement at the REL" if count(noisy) == 0

said(measurement, value, figure) := sprintf("the measurement of %s reaches the REL and does not give the %s", [measurement.date, figure]) if {
	value == null
} else := sprintf("%s measured on %s", [figure, measurement.date])

# A level from before a change or control, after which the group was measured again, tells nothing of the group now.
noisy := [measurement | some measurement in input.measurements; measurement.current; may_matter(measurement)]

may_matter(measurement) if measurement.max_dba != null

may_matter(measurement) if measurement.peak_db != null

may_matter(measurement) if measurement.reaches_enrolling == true

peak_matters(measurement) if measurement.peak_db != null

peak_matters(_) if input.impulsive == true
