# METADATA
# title: Yearly audiometric exam
# description: >-
#   The audiometric exam is repeated at least annually (anualmente), with the admission exam as reference. The
#   text leaves open whether that is a fixed anniversary or twelve months from the exam before; twelve months from
#   the exam before are judged. Exams of which only the outcome is on record count, too.
# custom:
#   cite: NR-7 Annex II item 4.1 b
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram, examination]
#   remedy: >-
#     Test the worker now and compare the result with the reference exam.
package duty.annual_audiometry

import data.common
import rego.v2

obligations contains {
	"every": "audiogram_interval",
	"during": stretch,
	"by": "test.done",
} if {
	some stretch in tested
}

tested := [{"from": start, "to": stretch.to} |
	some employment in input.employed
	some stretch in input.enrolled
	common.covers(employment, stretch.from)
	start := max([first_day(employment, stretch), asked_since])
	not common.over(stretch, start)
]

# An exam from before the rule is followed by the next one within the interval from its first day.
asked_since := data.parameters.audiogram_interval.values[0].from

# Who is hired for work above the action level: twelve months from the admission exam.
first_day(employment, stretch) := max(before) if {
	before := [day | some day in exams_of(employment); day <= stretch.from]
	count(before) > 0
	employment.from == stretch.from
} else := stretch.from if {
	some day in exams_of(employment)
	day <= stretch.from
} else := min(exams_of(employment)) if {
	count(exams_of(employment)) > 0
}

# The exams from the end of the employment before on.
exams_of(employment) := [day |
	some day in days
	every other in input.employed { not after(other, employment, day) }
]

# Whether an exam belongs to another employment, which ended before this one.
after(other, employment, day) if {
	other.to != null
	other.to <= employment.from
	day < other.to
}

days := array.concat(
	[test.date |
		some test in input.audiograms
		test.invalidated == false
		test.ears_with_result > 0
	],
	[examination.attended_on |
		some examination in input.examinations
		examination.kind == "hearing_test"
		examination.attended_on != null
	],
)

not_owed contains "no stretch above the action level is known" if count(input.enrolled) == 0

not_owed contains "there is no exam yet, which is a finding of its own" if {
	count(input.enrolled) > 0
	count(tested) == 0
}
