# METADATA
# title: Result classified
# description: >-
#   The technician says of each test whether it shows an abnormal audiogram or an abnormal shift. Until 30 March 2023
#   the definitions are numbers, which decide here; for later tests they were not found, so the technician's
#   classification is asked for. A notice of the result, a follow-up, or a review or comparison on record is one.
#   Tests of which the outcome alone is on record are taken as recorded.
# custom:
#   cite: OHS Code, s. 223(3); former s. 1
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [audiogram, follow_up, notice]
#   remedy: Have the audiometric technician classify the test, and record the outcome.
package duty.result_classified

import data.common
import rego.v2

obligations contains {
	"key": test.id,
	"on": test.date,
	"holds": decided(test),
	"missing": common.missing(decided(test), "the thresholds that the definitions ask for"),
	"note": sprintf("test of %s, by the definitions that held on that day", [test.date]),
	"because": [test.ref],
	"health": {"definitions_met": shown(test)},
} if {
	some test in tests
	defined(test)
}

obligations contains {
	"key": test.id,
	"ask": "Does the test show an abnormal audiogram or an abnormal shift?",
	"of": "audiometric technician",
	"by": classification(test),
	"note": sprintf("test of %s, for which no definition was found", [test.date]),
	"because": [test.ref],
} if {
	some test in tests
	not defined(test)
}

not_owed contains "no hearing test with thresholds under the program is on record" if count(tests) == 0

tests := [a | some a in input.audiograms; a.in_program]

defined(test) if common.at(data.parameters.abnormal_low, test.date) != null

# One definition that is met decides; without one all must be refuted. The baseline itself can show no shift.
decided(test) if count(shown(test)) > 0

decided(test) if {
	count(shown(test)) == 0
	count(undecided(test)) == 0
}

decided(test) := null if {
	count(shown(test)) == 0
	count(undecided(test)) > 0
}

undecided(test) := {name |
	some name in names(test)
	some ear in ["left", "right"]
	test.schemes[name][ear] == null
}

names(test) := ["abnormal_low", "abnormal_high", "one_sided"] if {
	test.ref == input.baseline.ref
} else := ["abnormal_low", "abnormal_high", "one_sided", "abnormal_shift"]

classification(test) := {"date": marks[0][0], "ref": marks[0][1]} if {
	marks := sort(array.concat(
		array.concat(
			[[done.date, done.ref] | some done in test.follow_ups],
			[[notice.date, notice.ref] | some notice in test.notices; notice.about in ["result", "abnormal_result", "shift"]],
		),
		[[day, test.ref] | some day in [test.reviewed_on, test.compared_on]; day != null],
	))
	count(marks) > 0
} else := null

# The definitions of the former section 1 that a test meets, in either ear.
shown(test) := sort({name |
	some name in ["abnormal_low", "abnormal_high", "one_sided", "abnormal_shift"]
	some ear in ["left", "right"]
	test.schemes[name][ear] == true
})
