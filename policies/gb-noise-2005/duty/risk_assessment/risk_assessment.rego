# METADATA
# title: Risk assessment
# description: >-
#   An employer who carries out work that is liable to expose any employee to noise at or above a lower exposure
#   action value makes a suitable and sufficient assessment of the risk, which names the measures that are needed.
#   The text sets no time: it is owed as soon as the work is done.
# custom:
#   cite: Control of Noise at Work Regulations reg 5(1)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [group, measurement, document]
#   remedy: Assess the risk from noise for the group and date the assessment.
package duty.risk_assessment

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": sprintf("the latest risk assessment is of %s", [papers[count(papers) - 1].date]),
	"because": common.refs(papers),
	"facts": {"workers": input.workers},
} if {
	liable != false
	count(papers) > 0
}

obligations contains {
	"holds": false,
	"note": "no risk assessment covers this group, whose work is liable to expose workers at or above a lower exposure action value",
	"facts": {"workers": input.workers},
} if {
	liable == true
	count(papers) == 0
}

obligations contains {
	"holds": null,
	"note": "no risk assessment covers this group, and it is not known whether its work is liable to expose anybody at or above a lower exposure action value",
	"missing": ["whether the work is suspected to be noisy, or its noise"],
	"facts": {"workers": input.workers},
} if {
	liable == null
	count(papers) == 0
}

not_owed contains "nothing suggests noise at a lower exposure action value" if liable == false

papers := [paper | some paper in input.documents; paper.kind == "risk_assessment"]

# The first of these that fits: noise that is known or suspected, noise of which nothing is known, quiet work.
liable if {
	common.any_current(input.exposed.lower)
} else if {
	input.suspected_noisy == true
	not_known
} else := null if {
	input.suspected_noisy == null
	not_known
} else := false

not_known if {
	some stretch in input.exposure_unknown.lower
	common.covers(stretch, input.as_of)
}
