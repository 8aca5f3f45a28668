# METADATA
# title: Access to the zone restricted
# description: >-
#   Access to a Hearing Protection Zone is restricted where this is practicable and the risk from exposure justifies
#   it. Both are a judgement.
# custom:
#   cite: Control of Noise at Work Regulations reg 7(3)(c)
#   subject: area
#   topic: protectors
#   severity: minor
#   evidence: [document, measurement, group]
#   remedy: Restrict access to the zone, or record why that is not practicable or the risk does not justify it.
package duty.zone_access

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "how access to the zone is restricted, or why not, is on record",
	"because": common.refs(papers),
	"facts": {"workers": input.workers},
} if {
	not exempted
	zone
	count(papers) > 0
}

obligations contains {
	"ask": "Is it practicable to restrict access to the zone, and does the risk justify it?",
	"of": "competent person",
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

papers := [paper | some paper in input.documents; paper.kind == "access_restriction"; names(paper)]

names(paper) if count(paper.covers) == 0

names(paper) if input.id in paper.covers

not_owed contains "nobody is known to be at or above an upper exposure action value in the area" if not zone

zone if common.any_current(input.exposed.upper)

exempted if input.choices.exemption in object.keys(exemption_cite)

exemption_cite := {
	"emergency_services": "Control of Noise at Work Regulations reg 12",
	"defence": "Control of Noise at Work Regulations reg 13",
}
