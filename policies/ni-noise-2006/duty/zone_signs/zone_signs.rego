# METADATA
# title: Hearing protection zone marked and signed
# description: >-
#   The Hearing Protection Zone is demarcated, and identified by the sign for ear protection of the Health and
#   Safety (Safety Signs and Signals) Regulations (Northern Ireland) 1996.
# custom:
#   cite: Control of Noise at Work Regulations reg 7(3)(b)
#   subject: area
#   topic: protectors
#   severity: major
#   evidence: [document, measurement, group]
#   remedy: Demarcate the zone, put up the sign at its entrances, and record a check of both.
package duty.zone_signs

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "the zone is demarcated and signed",
	"because": common.refs(papers),
	"facts": {"workers": input.workers},
} if {
	not exempted
	zone
	count(papers) > 0
}

obligations contains {
	"holds": false,
	"note": "no record shows that the zone is demarcated and signed",
	"facts": {"workers": input.workers},
} if {
	not exempted
	zone
	count(papers) == 0
}

obligations contains {
	"lifted": "a certificate exempts the site from hearing protection zones",
	"cite": exemption_cite[input.choices.exemption],
	"on": input.as_of,
} if {
	exempted
	zone
}

# A paper of the whole site counts for every area, or for those that it names.
papers := [paper |
	some paper in input.documents
	paper.kind == "zone_signs"
	names(paper)
]

names(paper) if count(paper.covers) == 0

names(paper) if input.id in paper.covers

not_owed contains "nobody is known to be at or above an upper exposure action value in the area" if not zone

zone if common.any_current(input.exposed.upper)

exempted if input.choices.exemption in object.keys(exemption_cite)

exemption_cite := {
	"emergency_services": "Control of Noise at Work Regulations reg 12",
	"defence": "Control of Noise at Work Regulations reg 13",
}
