# METADATA
# title: What an audiological exam consists of
# description: >-
#   Every audiological exam, reference and sequential, consists of a clinical-occupational history (anamnese), an
#   otological exam and the audiometric exam, and further exams at the physician's discretion. The record is the
#   medical control programme (PCMSO), which lays this down, as a document of kind health_surveillance.
# custom:
#   cite: NR-7 Annex II item 2.1
#   subject: site
#   topic: audiometry
#   severity: minor
#   evidence: [document]
#   remedy: >-
#     Lay down in the PCMSO that every exam comes with history and otological exam, and name in covers what it
#     holds.
package duty.exam_contents

import data.common
import rego.v2

obligations contains {
	"holds": false,
	"note": "workers are above the action level and no medical control programme (PCMSO) is on record",
} if {
	concerned
	count(programmes) == 0
}

obligations contains {
	"holds": null,
	"note": "the medical control programme is on record, but not what it holds",
	"missing": ["what the programme lays down for an exam"],
	"because": [latest.ref],
} if {
	concerned
	count(programmes) > 0
	count(latest.covers) == 0
}

obligations contains {
	"holds": count(lacking) == 0,
	"on": latest.date,
	"note": said,
	"because": [latest.ref],
	"facts": {"holds": latest.covers, "lacks": lacking},
} if {
	concerned
	count(latest.covers) > 0
}

not_owed contains "no worker of the site is known to be above the action level" if not concerned

concerned if input.enrolled_ever > 0

programmes := [document | some document in input.documents; document.kind == "health_surveillance"]

latest := programmes[count(programmes) - 1]

lacking := sort({word | some word in common.at(data.parameters.exam_contents, input.as_of)} - {word | some word in latest.covers})

said := "the medical control programme holds all parts of an exam" if {
	count(lacking) == 0
} else := sprintf("the medical control programme does not hold: %s", [common.in_words(lacking)])
