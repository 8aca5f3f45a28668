# METADATA
# title: Contents of the audiometric record
# description: >-
#   The audiometric test record of each miner tested includes name and job classification, all audiograms, evidence that
#   they were conducted as 62.171(a) asks, the exposure determinations and the results of follow-up examinations. Held
#   against it are job classification and exposure determination of each test; evidence of the procedure is the matter
#   of test-procedure, lost audiograms of audiogram-records-kept.
# custom:
#   cite: 30 CFR 62.171(b)(1)-(5)
#   subject: worker
#   topic: records
#   severity: minor
#   evidence: [audiogram, worker, measurement]
#   remedy: Add what the record lacks, from the personnel file and the noise surveys.
package duty.audiogram_record_content

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "every audiometric record has job classification and exposure determination",
	"facts": {"audiograms": count(program_tests)},
	"because": [program_tests[0].ref],
} if {
	count(program_tests) > 0
	count(incomplete) == 0
}

obligations contains {
	"holds": false,
	"note": sprintf("audiometric records that lack contents: %d (%s)", [count(incomplete), concat(", ", lacking)]),
	"facts": {"audiograms": count(program_tests), "incomplete": count(incomplete), "lacking": lacking},
	"because": common.refs(incomplete),
} if {
	count(incomplete) > 0
}

# Part 62 asks for these two of what other laws ask for.
asked_for := {"job classification", "most recent noise exposure assessment"}

# Tests under the program: those made while in it, and the baseline.
program_tests := [test | some test in input.audiograms; test.in_program]

incomplete := [test | some test in program_tests; count(lacks(test)) > 0]

lacks(test) := [lack | some lack in test.record_lacks; lack in asked_for]

lacking := sort({lack | some test in incomplete; some lack in lacks(test)})

not_owed contains "there is no audiogram under the program" if count(program_tests) == 0
