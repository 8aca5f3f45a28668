# METADATA
# title: Reportable hearing loss reported to MSHA
# description: >-
#   A reportable hearing loss, an average change for the worse of 25 dB or more at 2000, 3000 and 4000 Hz in either ear
#   against the baseline, or against a baseline revised for significant improvement, is reported to MSHA as noise-induced
#   hearing loss under Part 50 (Form 7000-1, within 10 working days), unless a physician or audiologist determines that
#   it is neither work-related nor aggravated by occupational noise. A loss is reported once for each ear; the first test
#   that shows it counts.
# custom:
#   cite: 30 CFR 62.175(b), 50.20(a)
#   subject: worker
#   topic: reporting
#   severity: major
#   evidence: [audiogram, follow_up]
#   remedy: >-
#     Mail MSHA Form 7000-1 now and record it (authority_report), or obtain the determination of a physician or
#     audiologist.
package duty.hearing_loss_reported

import data.common
import rego.v2

obligations contains object.union(verdict(test), {
	"key": test.id,
	"facts": {"ears": new_ears(test)},
	"health": test.hearing,
}) if {
	some test in showing
	count(new_ears(test)) > 0
}

obligations contains {
	"key": test.id,
	"holds": null,
	"on": test.date,
	"note": sprintf("it is not known whether the audiogram of %s shows a reportable hearing loss", [test.date]),
	"missing": lacking(test),
	"health": test.hearing,
	"because": [test.ref],
} if {
	some test in unclear
	undecided(test)
}

not_owed contains "no audiogram in the program shows a reportable hearing loss" if {
	every test in showing { count(new_ears(test)) == 0 }
	every test in unclear { not undecided(test) }
}

# Tests that are compared with the baseline; a retest in time stands in for its test, and a test that became the new
# baseline after a long absence is compared with no other.
standing_tests := [test |
	some test in input.audiograms
	test.to_compare
	test.replaced_by == null
	not test.ref in set_anew
]

set_anew := {revision.audiogram | some revision in input.revisions; revision.result == "new_baseline"}

showing := [test | some test in standing_tests; test.schemes.reportable[_] == true]

unclear := [test | some test in standing_tests; test.schemes.reportable[_] == null]

shown(test) := [ear | some ear in ["left", "right"]; test.schemes.reportable[ear] == true]

# Ears that no earlier test shows, unless that loss was found not to be due to noise at work.
new_ears(test) := [ear | some ear in shown(test); not shown_before(ear, test)]

shown_before(ear, test) if {
	some earlier in showing
	earlier.date < test.date
	ear in shown(earlier)
	not_work_related(earlier) == null
}

# An ear whose loss an earlier test shows is not asked about again.
undecided(test) if {
	count(new_ears(test)) == 0
	some ear in ["left", "right"]
	test.schemes.reportable[ear] == null
	not shown_before(ear, test)
}

lacking(test) := test.cannot_compare if {
	count(test.cannot_compare) > 0
} else := ["thresholds from which the average change follows"]

verdict(test) := {
	"lifted": "a physician or audiologist found that the loss is neither work-related nor aggravated by noise at work",
	"cite": "30 CFR 62.175(b)",
	"because": common.refs([test, not_work_related(test)]),
} if {
	not_work_related(test) != null
} else := {
	"after": test.received_on,
	"within": "report_time",
	"by": report(test),
	"note": sprintf("the audiogram of %s shows a reportable hearing loss", [test.date]),
	"missing": common.missing(test.received_on, "the day on which the result was received"),
	"because": [test.ref],
}

follow_ups(test) := [done |
	some other in input.audiograms
	other.ref in {test.ref, test.retest_of}
	some done in other.follow_ups
]

not_work_related(test) := {"date": found[0].date, "ref": found[0].ref} if {
	found := [done |
		some done in follow_ups(test)
		done.kind == "medical_opinion"
		done.result == "not_work_related"
		done.by_is in data.measures.hearing.licensed
	]
	count(found) > 0
} else := null

report(test) := {"date": found[0].date, "ref": found[0].ref} if {
	found := [done | some done in follow_ups(test); done.kind == "authority_report"]
	count(found) > 0
} else := null
