# METADATA
# title: Medical record kept
# description: >-
#   The medical record (prontuário), and with it the audiometric exams, is kept for at least 20 years after
#   dismissal. An exam that other records speak of, but that is not there, was not kept.
# custom:
#   cite: NR-7 7.6.1
#   subject: worker
#   topic: records
#   severity: major
#   evidence: [audiogram, worker]
#   remedy: >-
#     Find the missing exam, at the clinic if need be, and file it with the medical record.
package duty.records_kept

import rego.v2

obligations contains {
	"key": lost.id,
	"holds": false,
	"on": last_day,
	"for": "record_retention",
	"note": sprintf("other records speak of the exam %s, which is not on file", [lost.id]),
	"because": [lost.ref],
} if {
	some lost in input.missing_audiograms
}

obligations contains {
	"key": "on file",
	"holds": true,
	"on": last_day,
	"for": "record_retention",
	"note": "every exam that the records speak of is on file",
	"facts": {"exams": count(input.audiograms), "oldest": input.audiograms[0].date},
	"because": [input.audiograms[0].ref],
} if {
	count(input.missing_audiograms) == 0
	count(input.audiograms) > 0
}

# The last day of the last employment; while employed, today.
last_day := input.as_of if {
	some employment in input.employed
	employment.current
} else := max([departure.last | some departure in input.departures])

not_owed contains "the records speak of no exam" if {
	count(input.missing_audiograms) == 0
	count(input.audiograms) == 0
}
