# METADATA
# title: Problem audiogram reviewed
# description: >-
#   An audiologist, otolaryngologist or physician reviews problem audiograms and determines whether there is a need for
#   further evaluation. The employer gives the reviewer the requirements of the standard, the worker's baseline and most
#   recent audiograms, the background levels of the test room and the calibration records of the audiometer.
# custom:
#   cite: 29 CFR 1910.95(g)(7)(iii)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [audiogram, tester]
#   remedy: >-
#     Have the audiogram reviewed by an audiologist, otolaryngologist or physician, and enter who reviewed it and when.
package duty.problem_audiogram_review

import rego.v2

obligations contains object.union(verdict(test), {
	"key": test.id,
	"on": test.date,
	"facts": {"problem": test.problem, "reviewed_on": test.reviewed_on, "reviewer": test.reviewer_is},
	"because": [test.ref],
}) if {
	some test in problem_audiograms
}

verdict(test) := {"holds": true, "note": sprintf("a professional found the audiogram of %s invalid", [test.date])} if {
	test.invalidated
} else := {"holds": false, "note": sprintf("the reviewer of the audiogram of %s is no audiologist, otolaryngologist or physician", [test.date])} if {
	test.reviewer_is != null
	not test.reviewer_is in data.measures.hearing.professionals
} else := {
	"holds": null,
	"missing": ["profession of the reviewer"],
	"note": sprintf("the audiogram of %s was reviewed, but it is not known by whom", [test.date]),
} if {
	test.reviewed_on != null
	test.reviewer_is == null
} else := {"holds": true, "note": sprintf("a professional reviewed the audiogram of %s", [test.date])} if {
	test.reviewed_on != null
} else := {
	"holds": null,
	"missing": ["day of the review"],
	"note": sprintf("a reviewer is named for the audiogram of %s, but not the day of the review", [test.date]),
} if {
	test.reviewer_named
} else := {"holds": false, "note": sprintf("the audiogram of %s shows %s, and no professional review is on record", [test.date, test.problem])}

# A test that a retest in time replaces is settled by the retest.
problem_audiograms := [test |
	some test in input.audiograms
	test.enrolled
	test.replaced_by == null
	test.problem != null
]

not_owed contains "no audiogram made while in the program stands out" if count(problem_audiograms) == 0
