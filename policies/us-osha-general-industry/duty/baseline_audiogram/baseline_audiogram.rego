# METADATA
# title: Baseline audiogram
# description: >-
#   Within 6 months of an employee's first exposure at or above the action level, the employer establishes a valid
#   baseline audiogram, against which later audiograms can be compared. Where a mobile test van is used to meet the
#   testing obligation, the baseline is obtained within 1 year of that first exposure.
# custom:
#   cite: 29 CFR 1910.95(g)(5)(i)-(ii)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram, measurement, assignment]
#   remedy: Test the worker now, after the quiet period, and file the result as the baseline audiogram.
package duty.baseline_audiogram

import rego.v2

obligations contains object.union(first_test(stretch), {"within": "baseline_time"}) if {
	some stretch in input.enrolled
	not by_van(stretch)
}

obligations contains object.union(first_test(stretch), {"within": "baseline_time_mobile"}) if {
	some stretch in input.enrolled
	by_van(stretch)
}

# The clock starts with the first day of exposure, not with the day of hire.
first_test(stretch) := {
	"key": stretch.from,
	"after": stretch.from,
	"by": stretch.baseline,
	"during": {"from": stretch.from, "to": stretch.to},
	"note": sprintf("exposure at or above the action level began on %s", [stretch.from]),
	"because": [exposure.ref | some exposure in input.exposures; exposure.from == stretch.from],
}

by_van(stretch) if stretch.baseline_mobile == true

by_van(stretch) if {
	stretch.baseline_mobile == null
	input.choices.mobile_test_van == true
}

not_owed contains "no stretch at or above the action level is known" if count(input.enrolled) == 0
