# METADATA
# title: Audiogram compared with the baseline
# description: >-
#   Each annual audiogram is compared with that employee's baseline audiogram, to determine whether the audiogram is
#   valid and whether a standard threshold shift has occurred. A technician may make the comparison. It needs the
#   thresholds of both tests.
# custom:
#   cite: 29 CFR 1910.95(g)(7)(i)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram]
#   remedy: >-
#     Compare the audiogram with the baseline and enter the day on which that was done; where a threshold is missing,
#     find the original record or test again.
package duty.audiogram_compared

import rego.v2

obligations contains object.union(verdict(test), {
	"key": test.id,
	"on": test.date,
	"because": [link.ref | some link in [test, input.baseline]; link != null],
}) if {
	some test in annual
}

verdict(test) := {
	"holds": null,
	"missing": test.cannot_compare,
	"note": "the audiogram cannot be compared with the baseline",
} if {
	count(test.cannot_compare) > 0
} else := {
	"holds": false,
	"note": "no comparison with the baseline is on record",
} if {
	test.compared_on == null
} else := {
	"holds": true,
	"note": "the audiogram was compared with the baseline",
	"facts": {"compared_on": test.compared_on},
}

# A test that a retest in time replaces needs no comparison of its own.
annual := [test | some test in input.audiograms; test.to_compare; test.replaced_by == null]

not_owed contains "there is no later audiogram, while in the program, to compare with the baseline" if count(annual) == 0
