# METADATA
# title: Frequencies tested
# description: >-
#   The audiometric exam is always made by air conduction at 500, 1000, 2000, 3000, 4000, 6000 and 8000 Hz, each
#   ear. No response up to the highest level is a result; a frequency that was left out is none.
# custom:
#   cite: NR-7 Annex II item 3.6 (secondary source)
#   subject: worker
#   topic: test-quality
#   severity: major
#   evidence: [audiogram]
#   remedy: >-
#     Enter the thresholds that the original record holds; if they were not tested, test again at all seven
#     frequencies in both ears.
package duty.test_frequencies

import rego.v2

obligations contains {
	"key": test.id,
	"on": test.date,
	"because": [test.ref],
	"holds": true,
	"note": "each ear was tested at all seven frequencies",
} if {
	some test in tests
	count(test.not_tested) == 0
	count(test.not_recorded) == 0
}

obligations contains {
	"key": test.id,
	"on": test.date,
	"because": [test.ref],
	"holds": false,
	"note": sprintf("the exam of %s left out: %s", [test.date, concat(", ", test.not_tested)]),
	"facts": {"not_tested": test.not_tested, "not_recorded": test.not_recorded},
} if {
	some test in tests
	count(test.not_tested) > 0
}

obligations contains {
	"key": test.id,
	"on": test.date,
	"because": [test.ref],
	"holds": null,
	"missing": test.not_recorded,
	"note": sprintf("the record of the exam of %s says nothing on %d required thresholds", [test.date, count(test.not_recorded)]),
} if {
	some test in tests
	count(test.not_tested) == 0
	count(test.not_recorded) > 0
}

tests := [test | some test in input.audiograms; test.in_program]

not_owed contains "there is no exam while above the action level" if count(tests) == 0
