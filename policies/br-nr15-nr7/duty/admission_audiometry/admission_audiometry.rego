# METADATA
# title: Audiometric exam at admission
# description: >-
#   The audiometric exam is made at admission (na admissão) of an employee who is going to work above the action
#   level, or, where exposure begins later, when it begins. It is the reference exam if there is none yet. Exams
#   of which only the outcome is on record count, too.
# custom:
#   cite: NR-7 Annex II item 4.1 a, 4.3.1
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram, examination, measurement]
#   remedy: >-
#     Test the worker before the work above the action level begins; a worker without any exam is to be tested at
#     once.
package duty.admission_audiometry

import data.common
import rego.v2

obligations contains {
	"key": start.from,
	"after": max([start.from, asked_since]),
	"within": "admission_time",
	"by": earliest(start),
} if {
	some start in starts
}

# The first stretch above the action level of each employment.
starts := [{"from": min(days), "since": employment.from, "to": employment.to} |
	some employment in input.employed
	days := [stretch.from |
		some stretch in input.enrolled
		common.covers(employment, stretch.from)
	]
	count(days) > 0
	not common.over(employment, asked_since)
]

# Who was above the action level before the rule is owed an exam from its first day on.
asked_since := data.parameters.admission_time.values[0].from

tests := array.concat(
	[{"date": test.date, "ref": test.ref} |
		some test in input.audiograms
		test.invalidated == false
		test.ears_with_result > 0
	],
	[{"date": examination.attended_on, "ref": examination.ref} |
		some examination in input.examinations
		examination.kind == "hearing_test"
		examination.attended_on != null
	],
)

# The first exam that belongs to the employment: made after the end of the one before.
earliest(start) := link if {
	ends := [other.to | some other in input.employed; other.to != null; other.to <= start.since]
	fitting := [test |
		some test in tests
		every end in ends { test.date >= end }
	]
	first := min([test.date | some test in fitting])
	link := [test | some test in fitting; test.date == first][0]
} else := null

not_owed contains "no stretch above the action level is known" if count(starts) == 0
