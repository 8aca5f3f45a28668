# METADATA
# title: Copy of the result
# description: >-
#   The technician gives a copy of the results of a hearing test to the worker. The wording of 2009 was read; it sets
#   no time. A notice of the result, or the day on which the worker was told, is asked for of tests within the time
#   for which they are kept.
# custom:
#   cite: OHS Code, s. 223(2)(e)
#   subject: worker
#   topic: follow-up
#   severity: minor
#   evidence: [audiogram, examination, notice]
#   remedy: Give the worker a copy of the result now, and record the day.
package duty.result_copy

import data.common
import rego.v2

obligations contains {
	"key": test.id,
	"on": test.date,
	"for": "test_record_retention",
	"holds": count(test.told) > 0,
	"note": note(test),
	"because": array.concat([test.ref], [test.told[0][1] | count(test.told) > 0]),
} if {
	some test in tests
}

not_owed contains "no hearing test under the program is on record" if count(tests) == 0

note(test) := sprintf("no record shows that the worker was given the result of the test of %s", [test.date]) if {
	count(test.told) == 0
} else := null

# Hearing tests under the program: those with thresholds, and those of which the outcome alone is on record.
tests := array.concat(
	[{"id": a.id, "date": a.date, "ref": a.ref, "told": told_of(a.notices, a.date)} |
		some a in input.audiograms
		a.in_program
		a.date >= first_day
	],
	[{"id": e.id, "date": e.attended_on, "ref": e.ref, "told": results_of(e.attended_on)} |
		some e in alone
	],
)

# Tests from before the law are not asked about.
first_day := data.parameters.test_record_retention.values[0].from

with_thresholds := {a.date | some a in input.audiograms}

alone := [e |
	some e in input.examinations
	e.kind == "hearing_test"
	e.attended_on != null
	not e.attended_on in with_thresholds
	some spell in input.enrolled
	common.covers(spell, e.attended_on)
]

told_of(notices, day) := sort(array.concat(
	[[notice.date, notice.ref] |
		some notice in notices
		notice.about in ["result", "abnormal_result", "shift"]
	],
	results_of(day),
))

results_of(day) := [[e.results_on, e.ref] |
	some e in input.examinations
	e.kind == "hearing_test"
	e.attended_on == day
	e.results_on != null
]
