# METADATA
# title: Exam on the day the physician has set
# description: >-
#   The physician in charge of the PCMSO may shorten the interval between audiometric exams; the exam is then made
#   by the day that he or she has set. The day stands on the record of the exam before; one on the record of a
#   clinical examination is that of the next clinical examination.
# custom:
#   cite: NR-7 Annex II item 4.2 (secondary source)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [examination, audiogram]
#   remedy: >-
#     Make the exam that the physician has asked for, and record it.
package duty.earlier_audiometry

import data.common
import rego.v2

obligations contains {
	"key": sprintf("%s", [examination.id]),
	"after": examination.attended_on,
	"within": "audiogram_interval",
	"no_later_than": examination.next_due,
	"by": next_exam(examination.attended_on),
	"during": stretch,
	"because": [examination.ref],
	"facts": {"day_set_by_the_physician": examination.next_due},
} if {
	some examination in with_a_day
	some stretch in input.enrolled
	common.covers(stretch, examination.attended_on)
}

with_a_day := [examination |
	some examination in input.examinations
	examination.kind == "hearing_test"
	examination.attended_on != null
	examination.next_due != null
]

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

next_exam(day) := link if {
	later := [test | some test in tests; test.date > day]
	first := min([test.date | some test in later])
	link := [test | some test in later; test.date == first][0]
} else := null

not_owed contains "no examination names a day for the next exam while above the action level" if {
	count([stretch |
		some examination in with_a_day
		some stretch in input.enrolled
		common.covers(stretch, examination.attended_on)
	]) == 0
}
