# METADATA
# title: Test frequencies (recommended)
# description: >-
#   Hearing tests are pure-tone air-conduction audiometry at 500, 1000, 2000, 3000, 4000 and 6000 Hz in each ear. NIOSH
#   advises 8000 Hz, too, which is not asked for here. No response up to the highest level is a result; a frequency that
#   was left out is none.
# custom:
#   cite: NIOSH 98-126, 1.6.1
#   subject: worker
#   topic: test-quality
#   severity: minor
#   evidence: [audiogram]
#   remedy: >-
#     Enter the thresholds that the original record holds; if they were not tested, test again at all frequencies in both
#     ears.
package duty.test_frequencies

import rego.v2

obligations contains {
	"key": test.id,
	"on": test.date,
	"because": [test.ref],
	"holds": true,
	"note": "each ear was tested at all required frequencies",
} if {
	some test in input.audiograms
	test.in_program
	count(test.not_tested) == 0
	count(test.not_recorded) == 0
}

obligations contains {
	"key": test.id,
	"on": test.date,
	"because": [test.ref],
	"holds": false,
	"note": sprintf("the test of %s left out: %s", [test.date, concat(", ", test.not_tested)]),
	"facts": {"not_tested": test.not_tested, "not_recorded": test.not_recorded},
} if {
	some test in input.audiograms
	test.in_program
	count(test.not_tested) > 0
}

obligations contains {
	"key": test.id,
	"on": test.date,
	"because": [test.ref],
	"holds": null,
	"missing": test.not_recorded,
	"note": sprintf("the record of the test of %s says nothing on required thresholds: %d", [test.date, count(test.not_recorded)]),
} if {
	some test in input.audiograms
	test.in_program
	count(test.not_tested) == 0
	count(test.not_recorded) > 0
}

not_owed contains "there is no audiogram under the program" if {
	every test in input.audiograms { test.in_program == false }
}
