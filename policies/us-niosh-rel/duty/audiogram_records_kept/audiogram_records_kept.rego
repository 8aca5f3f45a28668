# METADATA
# title: Audiograms kept (recommended)
# description: >-
#   Records of hearing tests are kept for the employment and 30 years after it. An audiogram that other records speak
#   of, but that is not there, was not kept.
# custom:
#   cite: NIOSH 98-126, 1.10 (from memory)
#   subject: worker
#   topic: records
#   severity: minor
#   evidence: [audiogram]
#   remedy: >-
#     Find the missing audiogram, at the clinic or testing firm if need be, and file it.
package duty.audiogram_records_kept

import data.common
import rego.v2

obligations contains {
	"key": lost.id,
	"holds": false,
	"note": sprintf("other records speak of the audiogram %s, which is not on file", [lost.id]),
	"because": [lost.ref],
} if {
	employed
	some lost in input.missing_audiograms
}

obligations contains {
	"key": lost.id,
	"holds": false,
	"on": left_on,
	"for": "medical_record_retention",
	"note": sprintf("other records speak of the audiogram %s of a former worker, which is not on file", [lost.id]),
	"because": [lost.ref],
} if {
	not employed
	some lost in input.missing_audiograms
}

obligations contains {
	"key": "on file",
	"holds": true,
	"note": "every audiogram that the records speak of is on file",
	"facts": {"audiograms": count(input.audiograms)},
	"because": [input.audiograms[0].ref],
} if {
	count(input.missing_audiograms) == 0
	count(input.audiograms) > 0
}

employed if common.any_current(input.employed)

left_on := max([stretch.to | some stretch in input.employed; stretch.to != null])

not_owed contains "the records speak of no audiogram" if {
	count(input.missing_audiograms) == 0
	count(input.audiograms) == 0
}
