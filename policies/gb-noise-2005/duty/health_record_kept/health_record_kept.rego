# METADATA
# title: Health records kept for 40 years (guidance)
# description: >-
#   Guidance, not law. Health records are kept for at least 40 years from the last entry; the Regulations set no
#   time. A hearing test that other records speak of, but that is not there, was not kept.
# custom:
#   cite: HSE, Record keeping in health surveillance (guidance)
#   subject: worker
#   topic: records
#   severity: minor
#   evidence: [audiogram, follow_up, notice]
#   remedy: Find the missing record, at the clinic if need be, and file it.
package duty.health_record_kept

import rego.v2

obligations contains {
	"key": lost.id,
	"holds": false,
	"on": lost.date,
	"for": "health_record_retention",
	"note": sprintf("other records speak of the audiogram %s, which is not on file", [lost.id]),
	"because": [lost.ref],
} if {
	some lost in input.missing_audiograms
}

obligations contains {
	"key": "on file",
	"holds": true,
	"note": "every audiogram that the records speak of is on file",
	"because": [input.audiograms[0].ref],
} if {
	count(input.missing_audiograms) == 0
	count(input.audiograms) > 0
}

not_owed contains "the records speak of no audiogram" if {
	count(input.missing_audiograms) == 0
	count(input.audiograms) == 0
}
