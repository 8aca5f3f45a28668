# METADATA
# title: Risk assessment checked regularly (guidance)
# description: >-
#   Guidance, not law. Regulation 5(4) asks for a regular review and names no figure; L108 suggests not to leave the
#   assessment for longer than about two years without checking whether it still holds.
# custom:
#   cite: HSE L108, review of the risk assessment (guidance)
#   subject: group
#   topic: monitoring
#   severity: minor
#   evidence: [document]
#   remedy: Check whether the risk assessment still holds and date the review.
package duty.assessment_review_interval

import data.common
import rego.v2

obligations contains {
	"every": "assessment_review_interval",
	"during": {"from": max([papers[0].date, spell.from]), "to": spell.to},
	"by": "document.risk_assessment",
} if {
	count(papers) > 0
	some spell in input.exposed.lower
	spell.current == true
}

not_owed contains "no risk assessment, or nobody at or above a lower exposure action value now" if not owed

owed if {
	count(papers) > 0
	common.any_current(input.exposed.lower)
}

papers := [paper | some paper in input.documents; paper.kind == "risk_assessment"]
