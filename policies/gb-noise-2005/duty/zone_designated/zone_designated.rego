# METADATA
# title: Hearing protection zone designated
# description: >-
#   An area in which an employee is likely to be exposed at or above an upper exposure action value for any reason
#   is designated a Hearing Protection Zone.
# custom:
#   cite: Control of Noise at Work Regulations reg 7(3)(a)
#   subject: area
#   topic: protectors
#   severity: major
#   evidence: [document, measurement, group]
#   remedy: Designate the area a Hearing Protection Zone, and enter it in the plan of zones.
package duty.zone_designated

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "the area is designated a hearing protection zone",
	"because": common.refs(papers),
	"facts": {"workers": input.workers},
} if {
	not exempted
	zone
	count(papers) > 0
}

obligations contains {
	"holds": false,
	"note": "no record designates the area a hearing protection zone",
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
	paper.kind == "zone_plan"
	names(paper)
]

names(paper) if count(paper.covers) == 0

names(paper) if input.id in paper.covers

obligations contains {
	"holds": null,
	"note": sprintf("it is not known whether anybody is at or above an upper exposure action value in the area: %s", [concat("; ", not_known)]),
	"missing": ["an exposure in the area that can be held against the upper exposure action values"],
	"facts": {"workers": input.workers},
} if {
	not exempted
	not zone
	count(not_known) > 0
}

not_owed contains "nobody is known to be at or above an upper exposure action value in the area" if {
	not zone
	not undecided
}

undecided if {
	not exempted
	count(not_known) > 0
}

# Of an area in which nobody is known to be at or above a lower action value risk-assessment and levels-assessed tell.
not_known := [stretch.reason |
	common.any_current(input.exposed.lower)
	some stretch in input.exposure_unknown.upper
	common.covers(stretch, input.as_of)
]

zone if common.any_current(input.exposed.upper)

exempted if input.choices.exemption in object.keys(exemption_cite)

exemption_cite := {
	"emergency_services": "Control of Noise at Work Regulations reg 12",
	"defence": "Control of Noise at Work Regulations reg 13",
}
