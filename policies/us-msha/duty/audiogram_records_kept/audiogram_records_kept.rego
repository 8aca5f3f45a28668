# METADATA
# title: Audiograms kept
# description: >-
#   The operator keeps the audiometric test records for the duration of the miner's employment and at least 6 months
#   after it. An audiogram that other records speak of, or a test that was attended, and of which no audiogram is there,
#   was not kept.
# custom:
#   cite: 30 CFR 62.171(c)
#   subject: worker
#   topic: records
#   severity: major
#   evidence: [audiogram, examination]
#   remedy: Find the missing audiogram, at the clinic or testing firm if need be, and file it.
package duty.audiogram_records_kept

import data.common
import rego.v2

obligations contains object.union(lost, {"holds": false}) if {
	ever_enrolled
	employed
	some lost in spoken_of
}

# Of a test that was attended the results take their time to come in, 62.172(a)(4).
obligations contains object.union(attended[i], {"after": test.attended_on, "within": "results_time", "by": null}) if {
	ever_enrolled
	employed
	some i, test in tests_attended
}

obligations contains object.union(lost, {"holds": false, "on": last_day, "for": "retention"}) if {
	ever_enrolled
	not employed
	last_day != null
	some lost in missing
}

obligations contains {
	"key": "on file",
	"holds": true,
	"note": "every audiogram that the records speak of is on file",
	"facts": {"audiograms": count(input.audiograms)},
	"because": [input.audiograms[0].ref],
} if {
	ever_enrolled
	employed
	count(missing) == 0
	count(input.audiograms) > 0
}

missing := array.concat(spoken_of, attended)

spoken_of := [{
	"key": lost.id,
	"note": sprintf("other records speak of the audiogram %s, which is not on file", [lost.id]),
	"because": [lost.ref],
} |
	some lost in input.missing_audiograms
]

attended := [{
	"key": test.id,
	"note": sprintf("the miner was tested on %s, and no audiogram of that day is on file", [test.attended_on]),
	"because": [test.ref],
} |
	some test in tests_attended
]

tests_attended := [test |
	some test in input.examinations
	test.kind == "hearing_test"
	test.attended_on != null
	not on_file(test.attended_on)
]

on_file(day) if {
	some test in input.audiograms
	test.date == day
}

# Records of other tests are no concern of Part 62.
ever_enrolled if count(input.enrolled) > 0

not_owed contains "the miner has never been in the program" if not ever_enrolled

employed if common.any_current(input.employed)

# The day after the last one.
last_day := max([stretch.to | some stretch in input.employed; stretch.to != null])

not_owed contains "the miner is no longer employed, and nothing is known to be lost" if {
	not employed
	count(missing) == 0
}

not_owed contains "the records speak of no audiogram" if {
	count(missing) == 0
	count(input.audiograms) == 0
}
