# METADATA
# title: Protectors available
# description: >-
#   Where an employee is likely to be exposed at or above a lower exposure action value, hearing protectors are made
#   available to the employee, without having to ask for them: the words "on request" of the Regulations of Great
#   Britain are missing here. Those at or above an upper action value are owed more, by regulation 7(2).
# custom:
#   cite: Control of Noise at Work Regulations reg 7(1)
#   subject: group
#   topic: protectors
#   severity: major
#   evidence: [document, protector_issue]
#   remedy: Make suitable protectors available to everybody in the group without asking, and record it.
package duty.protectors_available

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "protectors are available without asking, or at hand to everybody in the group",
	"because": common.refs(papers),
	"facts": facts,
} if {
	not exempted
	concerned
	available
}

obligations contains {
	"holds": false,
	"note": "no record shows that protectors are available without asking",
	"facts": facts,
} if {
	not exempted
	concerned
	not available
}

obligations contains {
	"lifted": "a certificate exempts the site from making protectors available",
	"cite": exemption_cite[input.choices.exemption],
	"on": input.as_of,
} if {
	exempted
	concerned
}

not_owed contains "the group is not known to be at or above a lower exposure action value, or it is at or above an upper one" if {
	not concerned
}

# Between the lower and the upper action values. Of those at the upper ones protectors-provided tells.
concerned if {
	at_lower
	not at_upper
}

at_lower if common.any_current(input.exposed.lower)

at_upper if common.any_current(input.exposed.upper)

available if count(papers) > 0

available if {
	input.workers > 0
	input.protector_holders == input.workers
}

papers := [paper | some paper in input.documents; paper.kind == "protectors_available"]

facts := {"workers": input.workers, "workers_with_protectors": input.protector_holders}

exempted if input.choices.exemption in object.keys(exemption_cite)

exemption_cite := {
	"overall_risk": "Control of Noise at Work Regulations reg 11",
	"emergency_services": "Control of Noise at Work Regulations reg 12",
	"defence": "Control of Noise at Work Regulations reg 13",
}
