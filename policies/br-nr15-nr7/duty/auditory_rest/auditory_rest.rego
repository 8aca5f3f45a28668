# METADATA
# title: Auditory rest before the exam
# description: >-
#   The employee has at least 14 hours of auditory rest (repouso auditivo) up to the moment of the audiometric
#   exam. The text does not let protectors take its place.
# custom:
#   cite: NR-7 Annex II item 3.4
#   subject: worker
#   topic: test-quality
#   severity: major
#   evidence: [audiogram]
#   remedy: >-
#     Enter the hours of rest from the exam form; if they were fewer, test again after 14 hours of rest.
package duty.auditory_rest

import data.common
import rego.v2

obligations contains {
	"key": test.id,
	"value": test.quiet_hours,
	"at_least": "quiet_period",
	"on": test.date,
	"note": sprintf("hours of auditory rest before the exam of %s", [test.date]),
	"missing": common.missing(test.quiet_hours, "the hours of auditory rest before the exam"),
	"because": [test.ref],
	"facts": {"protectors_worn_instead": test.quiet_by_protectors},
} if {
	some test in tests
}

# Exams since the rule is in force.
tests := [test |
	some test in input.audiograms
	test.in_program
	common.at(data.parameters.quiet_period, test.date) != null
]

not_owed contains "there is no exam while above the action level" if count(tests) == 0
