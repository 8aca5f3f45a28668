# METADATA
# title: Letter about a threshold shift
# description: >-
#   If comparison of the annual audiogram with the baseline audiogram indicates that a standard threshold shift has
#   occurred, the employee is informed of this fact in writing within 21 days of the determination. The letter is
#   owed even where a physician finds that the shift is not related to work: that exception lifts the further
#   follow-up, not the letter.
# custom:
#   cite: 29 CFR 1910.95(g)(8)(i)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [notice, audiogram]
#   remedy: Inform the worker of the shift in writing now, and keep a dated copy.
package duty.shift_notice

import data.common
import rego.v2

obligations contains {
	"key": shift.id,
	"within": "shift_notice_time",
	"after": shift.determined_on,
	"by": shift.notice,
	"note": found(shift),
	"facts": {"ears": shift.ears, "age_corrected": shift.age_corrected, "known_only_as_at_least": shift.at_least},
	"health": shift.hearing,
	"because": records(shift),
} if {
	some shift in input.shifts
	not unclear(shift)
}

obligations contains {
	"key": shift.id,
	"holds": null,
	"missing": ["whether the notice was in writing"],
	"note": sprintf("the worker was told on %s of the shift that the test of %s shows, but it is not known whether in writing", [shift.unclear_notice.date, shift.date]),
	"facts": {"told_on": shift.unclear_notice.date, "ears": shift.ears},
	"health": shift.hearing,
	"because": records(shift),
} if {
	some shift in input.shifts
	unclear(shift)
}

unclear(shift) if {
	shift.notice == null
	shift.unclear_notice != null
}

found(shift) := sprintf("the test of %s shows a shift, of which the worker was told, but not in writing", [shift.date]) if {
	shift.notice == null
	shift.oral_notice != null
} else := sprintf("the test of %s shows a shift, of which the worker is to be informed in writing", [shift.date])

records(shift) := common.refs([shift.first_test, shift, input.baseline, shift.notice, shift.unclear_notice, shift.oral_notice])

not_owed contains "no audiogram made while in the program shows a shift" if count(input.shifts) == 0
