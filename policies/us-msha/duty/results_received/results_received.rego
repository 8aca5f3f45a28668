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
	day_only(test)
}

obligations contains {
	"key": test.id,
	"after": test.date,
	"within": "results_time",
	"by": received(test),
	"note": sprintf("results of the audiogram of %s", [test.date]),
	"because": [test.ref],
} if {
	some test in tests
	not day_only(test)
}

day_only(test) if {
	test.received_on == null
	evaluated(test)
}

evaluated(test) if test.reviewed_on != null

evaluated(test) if test.reviewer_named == true

# Invalid ones, too: that they are is the interpretation. Of tests from before the law began nothing is owed.
tests := [test |
	some test in input.audiograms
	under_program(test)
	test.date >= data.parameters.results_time.values[0].from
]

under_program(test) if test.in_program

under_program(test) if {
	test.invalidated
	test.enrolled
}

received(test) := {"date": test.received_on, "ref": test.ref} if {
	test.received_on != null
} else := null

not_owed contains "there is no audiogram under the program" if count(tests) == 0
