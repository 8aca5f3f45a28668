# METADATA
# title: Results obtained
# description: >-
#   The operator obtains the results and the interpretation of results within 30 calendar days of conducting the
#   audiogram.
# custom:
#   cite: 30 CFR 62.172(a)(4)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram]
#   remedy: Get the results with their interpretation from the clinic or testing firm, and enter the day on which they came in.
package duty.results_received

import rego.v2

# The interpretation is there, so that the results came in; only the day is not on record.
obligations contains {
	"key": test.id,
	"holds": null,
	"on": test.date,
	"note": sprintf("the audiogram of %s was evaluated, and it is not known when the results were received", [test.date]),
	"missing": ["the day on which the result was received"],
	"because": [test.ref],
} if {
	some test in tests
	day_only(test.received_on, test.reviewed_on, test.reviewer_named)
}

obligations contains {
	"key": test.id,
	"after": test.date,
	"within": "results_time",
	"by": received(test.received_on, test.ref),
	"note": sprintf("results of the audiogram of %s", [test.date]),
	"because": [test.ref],
} if {
	some test in tests
	not day_only(test.received_on, test.reviewed_on, test.reviewer_named)
}

day_only(received_on, reviewed_on, reviewer_named) if {
	received_on == null
	evaluated(reviewed_on, reviewer_named)
}

evaluated(reviewed_on, _) if reviewed_on != null

evaluated(_, reviewer_named) if reviewer_named == true

# Invalid ones, too: that they are is the interpretation. Of tests from before the law began nothing is owed.
tests := [test |
	some test in input.audiograms
	under_program(test.in_program, test.invalidated, test.enrolled)
	test.date >= first_day
]

first_day := data.parameters.results_time.values[0].from

under_program(in_program, _, _) if in_program

under_program(_, invalidated, enrolled) if {
	invalidated
	enrolled
}

received(day, ref) := {"date": day, "ref": ref} if {
	day != null
} else := null

not_owed contains "there is no audiogram under the program" if count(tests) == 0
