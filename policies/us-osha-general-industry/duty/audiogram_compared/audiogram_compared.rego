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

obligations contains {
	"key": test.id,
	"on": test.date,
	"because": [test.ref, baseline],
	"health": test.hearing,
	"holds": true,
	"note": "the audiogram was compared with the baseline",
	"facts": {"compared_on": test.compared_on},
} if {
	some test in input.audiograms
	test.to_compare
	test.compared_on != null
	count(test.cannot_compare) == 0
}

obligations contains {
	"key": test.id,
	"on": test.date,
	"because": [test.ref, baseline],
	"health": test.hearing,
	"holds": false,
	"note": sprintf("no comparison of the audiogram of %s with the baseline is on record", [test.date]),
} if {
	some test in input.audiograms
	test.to_compare
	test.compared_on == null
	count(test.cannot_compare) == 0
}

obligations contains {
	"key": test.id,
	"on": test.date,
	"because": [test.ref, baseline],
	"health": test.hearing,
	"holds": null,
	"missing": test.cannot_compare,
	"note": sprintf("the audiogram of %s cannot be compared with the baseline", [test.date]),
} if {
	some test in input.audiograms
	test.to_compare
	count(test.cannot_compare) > 0
}

default baseline := null

baseline := input.baseline.ref

not_owed contains "there is no later audiogram, while in the program, to compare with the baseline" if {
	every test in input.audiograms { test.to_compare == false }
}
