# METADATA
# title: Audiograms kept
# description: >-
#   The employer retains all employee audiometric test records obtained under the standard, for the duration of the
#   affected employee's employment. An audiogram that other records speak of, but that is not there, was not retained.
# custom:
#   cite: 29 CFR 1910.95(m)(2)(i), (m)(3)(ii)
#   subject: worker
#   topic: records
#   severity: major
#   evidence: [audiogram]
#   remedy: Find the missing audiogram, at the clinic or testing firm if need be, and file it.
package duty.audiogram_records_kept

import data.common
import rego.v2

obligations contains {
	"key": lost.id,
	"holds": false,
	"on": lost.date,
	"note": sprintf("other records speak of the audiogram %s, which is not on file", [lost.id]),
	"because": [lost.ref],
} if {
	employed
	some lost in input.missing_audiograms
}

obligations contains {
	"key": "on file",
	"holds": true,
	"note": "every audiogram that the records speak of is on file",
	"facts": {"audiograms": count(input.audiograms), "oldest": input.audiograms[0].date},
	"because": [input.audiograms[0].ref],
} if {
	employed
	count(input.missing_audiograms) == 0
	count(input.audiograms) > 0
}

employed if common.any_current(input.employed)

not_owed contains "the worker is no longer employed" if not employed

not_owed contains "the records speak of no audiogram" if {
	count(input.missing_audiograms) == 0
	count(input.audiograms) == 0
}
