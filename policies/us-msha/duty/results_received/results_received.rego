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

obligations contains {
	"key": test.id,
	"after": test.date,
	"within": "results_time",
	"by": received(test),
	"note": sprintf("results of the audiogram of %s", [test.date]),
	"because": [test.ref],
} if {
	some test in tests
}

# Invalid ones, too: that they are is the interpretation.
tests := [test | some test in input.audiograms; under_program(test)]

under_program(test) if test.in_program

under_program(test) if {
	test.invalidated
	test.enrolled
}

received(test) := {"date": test.received_on, "ref": test.ref} if {
	test.received_on != null
} else := null

not_owed contains "there is no audiogram under the program" if count(tests) == 0
