# METADATA
# title: Contents of the audiometric record
# description: >-
#   The audiometric test record includes the name and job classification of the employee, the date of the audiogram, the
#   examiner's name, the date of the last acoustic or exhaustive calibration of the audiometer, and the employee's most
#   recent noise exposure assessment.
# custom:
#   cite: 29 CFR 1910.95(m)(2)(ii)
#   subject: worker
#   topic: records
#   severity: minor
#   evidence: [audiogram, worker, tester, calibration, measurement]
#   remedy: Add what the records lack, from the test sheets, the calibration reports and the noise measurements.
package duty.audiogram_record_content

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "every audiometric record has the contents that the paragraph lists",
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

# Tests under the program: those made while in it, and the baseline.
program_tests := [test | some test in input.audiograms; test.in_program]

incomplete := [test | some test in program_tests; test.record_lacks != []]

lacking := sort({lack | some test in incomplete; some lack in test.record_lacks})

not_owed contains "there is no audiogram under the program" if count(program_tests) == 0
