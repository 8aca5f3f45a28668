# METADATA
# title: Results of tests kept
# description: >-
#   The results of hearing tests are kept for at least ten years by the technician; the medical history is under the
#   sole control of the designated professional. A test that other records speak of, and that is not there, was not
#   kept.
# custom:
#   cite: OHS Code, s. 223(2)(f)
#   subject: worker
#   topic: records
#   severity: minor
#   evidence: [audiogram, examination]
#   remedy: Find the missing test at the technician or clinic, and record that it was done.
package duty.test_records_kept

import data.common
import rego.v2

obligations contains {
	"key": lost.id,
	"holds": false,
	"on": lost.date,
	"for": "test_record_retention",
	"note": sprintf("other records speak of the audiogram %s, which is not on file", [lost.id]),
	"because": [lost.ref],
} if {
	some lost in input.missing_audiograms
}

obligations contains {
	"key": "on file",
	"holds": true,
	"note": "every test that the records speak of is on file",
	"because": [tests[0]],
	"facts": {"tests": count(tests)},
} if {
	count(input.missing_audiograms) == 0
	count(tests) > 0
}

not_owed contains "the records speak of no hearing test" if {
	count(input.missing_audiograms) == 0
	count(tests) == 0
}

tests := array.concat(
	common.refs(input.audiograms),
	[e.ref | some e in input.examinations; e.kind == "hearing_test"; e.attended_on != null],
)
