# METADATA
# title: Risk assessment reviewed
# description: >-
#   The risk assessment (avaliação de riscos) of the risk management programme (PGR) is reviewed at least every
#   two years, or every three years where the organization has a certified occupational health and safety
#   management system. Beside that it is reviewed upon changes and accidents, which the program does not judge.
# custom:
#   cite: NR-1 1.5.4.4.6 (from memory)
#   subject: site
#   topic: monitoring
#   severity: major
#   evidence: [document]
#   remedy: >-
#     Review the risk assessment of the PGR and record the day; keep it as a document of kind risk_assessment.
package duty.risk_review

import rego.v2

obligations contains {
	"every": interval,
	"during": {"from": max([assessments[0].date, asked_since]), "to": null},
	"by": "document.risk_assessment",
	"because": [assessments[0].ref],
} if {
	count(assessments) > 0
}

obligations contains {
	"holds": false,
	"note": "no risk assessment is on record",
} if {
	count(assessments) == 0
}

assessments := [document | some document in input.documents; document.kind == "risk_assessment"]

interval := "risk_review_interval_certified" if {
	input.choices.certified_management_system == true
} else := "risk_review_interval"

# An assessment from before the rule is to be reviewed within the interval from its first day.
asked_since := data.parameters.risk_review_interval.values[0].from

# Every organization assesses its risks.
not_owed := set()
