# METADATA
# title: Audiogram evaluated
# description: >-
#   A physician, an audiologist, or a qualified technician under one of them determines of each audiogram whether it is
#   valid and whether it shows a standard threshold shift or a reportable hearing loss. The interpretation is obtained
#   within 30 calendar days of the test.
# custom:
#   cite: 30 CFR 62.172(a)(2), (a)(4)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram, tester]
#   remedy: Have a physician, audiologist or qualified technician evaluate the audiogram, and enter who did it and when.
package duty.audiogram_evaluated

import rego.v2

obligations contains object.union(verdict(test.date, test.ref, test.reviewed_on, test.reviewer_is, test.reviewer_named), {
	"key": test.id,
	"health": test.hearing,
	"because": [test.ref],
}) if {
	some test in program_tests
}

# Of tests from before the law began nothing is owed.
program_tests := [test |
	some test in input.audiograms
	test.in_program
	test.date >= first_day
]

first_day := data.parameters.results_time.values[0].from

evaluators := {"physician", "otolaryngologist", "audiologist", "technician"}

verdict(date, ref, reviewed_on, reviewer_is, reviewer_named) := {
	"after": date,
	"within": "results_time",
	"by": {"date": reviewed_on, "ref": ref},
} if {
	reviewed_on != null
	reviewer_is in evaluators
} else := {
	"after": date,
	"within": "results_time",
	"by": null,
	"note": sprintf("no evaluation of the audiogram of %s is on record", [date]),
} if {
	reviewed_on == null
	reviewer_named == false
} else := {
	"holds": null,
	"on": date,
	"note": sprintf("an evaluator of the audiogram of %s is on record, and no day", [date]),
	"missing": ["the day of the evaluation"],
} if {
	reviewed_on == null
} else := {
	"holds": null,
	"on": date,
	"note": sprintf("it is not known who evaluated the audiogram of %s", [date]),
	"missing": ["the profession of who evaluated it"],
} if {
	reviewer_is == null
} else := {
	"holds": false,
	"on": date,
	"note": sprintf("who evaluated the audiogram of %s is neither physician, audiologist nor technician", [date]),
}

not_owed contains "there is no audiogram under the program" if count(program_tests) == 0
