# METADATA
# title: Warning signs (recommended)
# description: >-
#   Signs that warn of hazardous noise and ask for protectors are posted at the entrances of areas where exposure is at
#   or above 85 dBA as an average of the day.
# custom:
#   cite: NIOSH 98-126, 1.7 (from memory)
#   subject: area
#   topic: information
#   severity: minor
#   evidence: [document, measurement]
#   remedy: >-
#     Post signs at the entrances, and keep a dated photo or checklist as a document of kind zone_signs that names the
#     area.
package duty.warning_signs

import data.common
import rego.v2

obligations contains {"holds": true, "on": signs[0].date, "because": common.refs(signs)} if {
	noisy
	count(signs) > 0
}

obligations contains {
	"holds": false,
	"note": "no record shows that signs are posted at the entrances",
	"facts": {"workers": input.workers},
} if {
	noisy
	count(signs) == 0
}

obligations contains {
	"holds": null,
	"note": sprintf("it is not known whether exposure in the area reaches the REL: %s", [concat("; ", not_known)]),
	"missing": ["an exposure that can be held against the REL"],
} if {
	not noisy
	count(not_known) > 0
	count(signs) == 0
}

not_owed contains "nobody who works in the area is known to be at or above the REL now" if {
	not noisy
	count(not_known) == 0
}

not_owed contains "signs are posted, whether or not they are needed" if {
	not noisy
	count(signs) > 0
}

noisy if common.any_current(input.exposed.rel)

not_known := [open.reason | some open in input.exposure_unknown.rel; common.covers(open, input.as_of)]

# Signs that are up: those taken down again do not count.
signs := [paper |
	some paper in input.documents
	paper.kind == "zone_signs"
	up(paper)
]

up(paper) if paper.posted_to == null

up(paper) if {
	paper.posted_to != null
	paper.posted_to >= input.as_of
}
