# METADATA
# title: Test frequencies
# description: >-
#   Audiometric tests are pure tone, air conduction, hearing threshold examinations, with test frequencies that include
#   as a minimum 500, 1000, 2000, 3000, 4000 and 6000 Hz, each tested separately in each ear. No response up to the
#   highest level is a result; a frequency that was left out is none.
# custom:
#   cite: 29 CFR 1910.95(h)(1)
#   subject: worker
#   topic: test-quality
#   severity: major
#   evidence: [audiogram]
#   remedy: >-
#     Enter the thresholds that the original record holds; if they were not tested, test again at all frequencies in
#     both ears.
package duty.test_frequencies

import rego.v2

obligations contains object.union(verdict(test), {"key": test.id, "on": test.date, "because": [test.ref]}) if {
	some test in program_tests
}

verdict(test) := {
	"holds": false,
	"note": sprintf("required thresholds that were not tested: %d", [count(test.not_tested)]),
	"facts": {"not_tested": test.not_tested, "not_recorded": test.not_recorded},
} if {
	count(test.not_tested) > 0
} else := {
	"holds": null,
	"missing": test.not_recorded,
	"note": sprintf("required thresholds on which the record says nothing: %d", [count(test.not_recorded)]),
} if {
	count(test.not_recorded) > 0
} else := {
	"holds": true,
	"note": "each ear was tested at all required frequencies",
}

# Tests under the paragraph: those made while in the program and the baseline, unless a professional voided them.
program_tests := [test | some test in input.audiograms; not test.invalidated; under_the_program(test)]

under_the_program(test) if test.enrolled

under_the_program(test) if {
	input.baseline.in_program
	test.ref == input.baseline.ref
}

not_owed contains "there is no audiogram under the program" if count(program_tests) == 0
