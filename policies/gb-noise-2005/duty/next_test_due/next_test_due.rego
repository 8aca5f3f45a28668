# METADATA
# title: Next test on the day the clinic gave (guidance)
# description: >-
#   Guidance, not law. Hearing is tested more often if a problem is found or the risk is high. The day that the
#   clinic gave for the next test is kept while the worker is at or above a lower exposure action value.
# custom:
#   cite: HSE, Health surveillance for noise (guidance)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [examination, audiogram]
#   remedy: Test the worker now; the clinic wanted it by the day given.
package duty.next_test_due

import data.common
import rego.v2

obligations contains {
	"key": examination.id,
	"after": examination.attended_on,
	"within": "test_interval_later",
	"no_later_than": examination.next_due,
	"by": following(examination),
	"note": sprintf("after the test of %s the clinic wants the next one by %s", [examination.attended_on, examination.next_due]),
	"because": [examination.ref],
} if {
	exposed
	some examination in wanted
}

not_owed contains "the clinic gave no day for a next test" if count(wanted) == 0

not_owed contains "the worker is not known to be at or above a lower exposure action value" if {
	count(wanted) > 0
	not exposed
}

exposed if common.any_current(input.exposed.lower)

wanted := [e |
	some e in input.examinations
	e.kind == "hearing_test"
	e.attended_on != null
	e.next_due != null
]

following(examination) := {"date": first[0], "ref": first[1]} if {
	first := min([test | some test in tests; test[0] > examination.attended_on])
} else := null

tests := array.concat(
	[[audiogram.date, audiogram.ref] | some audiogram in input.audiograms; audiogram.invalidated == false],
	[[e.attended_on, e.ref] | some e in input.examinations; e.kind == "hearing_test"; e.attended_on != null],
)
