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
	"holds": verdict,
	"missing": common.missing(verdict, "the thresholds that the definitions ask for"),
	"note": sprintf("test of %s, by the definitions that held on that day", [test.date]),
	"because": [test.ref],
	"health": {"definitions_met": met},
} if {
	some test in tests
	defined(test.date)
	met := shown(test.schemes)
	verdict := decided(met, undecided(test.schemes, names(test.ref)))
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
	not defined(test.date)
}

not_owed contains "no hearing test with thresholds under the program is on record" if count(tests) == 0

tests := [a | some a in input.audiograms; a.in_program; a.date >= first_day]

# Tests from before the law are not asked about.
first_day := data.parameters.baseline_time.values[0].from

defined(day) if common.at(data.parameters.abnormal_low, day) != null

# One definition that is met decides; without one all must be refuted. The baseline itself can show no shift.
decided(met, _) if count(met) > 0

decided(met, open) if {
	count(met) == 0
	count(open) == 0
}

decided(met, open) := null if {
	count(met) == 0
	count(open) > 0
}

undecided(schemes, asked) := {name |
	some name in asked
	schemes[name][_] == null
}

names(ref) := ["abnormal_low", "abnormal_high", "one_sided"] if {
	ref == input.baseline.ref
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
shown(schemes) := sort({name |
	some name in ["abnormal_low", "abnormal_high", "one_sided", "abnormal_shift"]
	schemes[name][_] == true
})
