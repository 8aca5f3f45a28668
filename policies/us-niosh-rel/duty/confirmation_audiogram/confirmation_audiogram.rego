# METADATA
# title: Confirmation audiogram (recommended)
# description: >-
#   When a monitoring audiogram shows a shift of 15 dB or more at any frequency in either ear, the worker is retested at
#   once; if the retest shows it, too, a confirmation audiogram follows within 30 days, after at least 12 hours of
#   quiet. The shift is significant only once the second test shows it. An immediate retest is a test of the same day; a
#   shift that it does not show needs no confirmation.
# custom:
#   cite: NIOSH 98-126, 1.6.3, 1.6.4 (times from memory)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [audiogram]
#   remedy: >-
#     Test the worker again now, after 12 hours of quiet, and record how long it was quiet.
package duty.confirmation_audiogram

import rego.v2

obligations contains {
	"key": test.id,
	"after": test.date,
	"within": "confirmation_time",
	"by": link(confirming(i)),
	"note": sprintf("the test of %s shows a shift that an earlier test does not confirm", [test.date]),
	"health": test.hearing,
	"because": [test.ref],
} if {
	some i, test in input.audiograms
	to_be_confirmed(i)
}

obligations contains {
	"key": sprintf("%s/quiet", [test.id]),
	"value": confirming(i).quiet_hours,
	"at_least": "quiet_period",
	"on": confirming(i).date,
	"missing": ["hours without noise before the confirmation audiogram" | confirming(i).quiet_hours == null],
	"note": sprintf("hours of quiet before the test of %s, which was to confirm the shift of %s", [confirming(i).date, test.date]),
	"because": [test.ref, confirming(i).ref],
} if {
	some i, test in input.audiograms
	to_be_confirmed(i)
	confirming(i) != null
}

obligations contains {
	"key": test.id,
	"holds": null,
	"on": test.date,
	"note": sprintf("the test of %s cannot be compared with the baseline, so it is not known whether it shows a shift", [test.date]),
	"missing": test.cannot_compare,
	"because": [test.ref],
} if {
	some i, test in input.audiograms
	test.to_compare
	count(test.cannot_compare) > 0
	not to_be_confirmed(i)
	not shows(test)
}

not_owed contains "no test made while at or above the REL shows a shift that was to be confirmed" if {
	every i, test in input.audiograms {
		not to_be_confirmed(i)
		not unclear(test)
	}
}

unclear(test) if {
	test.to_compare
	count(test.cannot_compare) > 0
	not shows(test)
}

to_be_confirmed(i) if {
	test := input.audiograms[i]
	test.enrolled
	not test.invalidated
	test.purpose != "exit"
	test.retest_of == null
	shows(test)
	not test.ref in confirming_refs
	not refuted_at_once(i)
}

# Whether one ear shows the shift in this test alone.
shows(test) if {
	some verdict in test.schemes.one_test
	verdict == true
}

# Tests that confirm an earlier one themselves; a test for which its retest stands in is named by the retest.
confirming_refs := {shift.ref | some shift in input.shifts; shift.confirms != null}

refuted_at_once(i) if {
	some other in later(i)
	other.date == input.audiograms[i].date
	every verdict in other.schemes.one_test { verdict == false }
}

later(i) := [other | some j, other in input.audiograms; j > i; not other.invalidated]

confirming(i) := tests[0] if {
	tests := [other | some other in later(i); other.date > input.audiograms[i].date]
	count(tests) > 0
} else := null

link(test) := {"date": test.date, "ref": test.ref} if {
	test != null
} else := null
