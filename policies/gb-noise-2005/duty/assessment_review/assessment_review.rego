# METADATA
# title: Risk assessment reviewed after a change
# description: >-
#   The risk assessment is reviewed forthwith if there is reason to suspect that it is no longer valid, or if the
#   work has changed significantly, and the changes that the review shows to be needed are made. A change that is
#   recorded as raising exposure is taken to be significant.
# custom:
#   cite: Control of Noise at Work Regulations reg 5(4)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [change, document]
#   remedy: Review the risk assessment in view of the change and date the review, or record that the change does not raise exposure.
package duty.assessment_review

import data.common
import rego.v2

obligations contains {
	"key": change.id,
	"after": change.date,
	"by": "document.risk_assessment",
	"note": sprintf("the change %s of %s raises exposure, so the risk assessment is to be reviewed", [change.id, change.date]),
	"because": [change.ref],
	"facts": {"change": change.what, "workers": input.workers},
} if {
	owed
	some change in input.changes
	change.raises_exposure == "yes"
}

obligations contains {
	"key": change.id,
	"holds": true,
	"on": change.date,
	"note": sprintf("the risk assessment was reviewed since the change %s of %s", [change.id, change.date]),
	"because": [change.ref, reviewed_since(change)[0]],
	"facts": {"change": change.what, "workers": input.workers},
} if {
	owed
	some change in of_unknown_effect
	count(reviewed_since(change)) > 0
}

obligations contains {
	"key": change.id,
	"holds": null,
	"on": change.date,
	"note": sprintf("the risk assessment was not reviewed since the change %s of %s, whose effect on exposure is not known", [change.id, change.date]),
	"missing": ["whether the change raises exposure"],
	"because": [change.ref],
	"facts": {"change": change.what, "workers": input.workers},
} if {
	owed
	some change in of_unknown_effect
	count(reviewed_since(change)) == 0
}

not_owed contains "no change that may raise exposure" if not changed

not_owed contains "there is no risk assessment to review; whether one is owed, risk-assessment tells" if {
	changed
	count(papers) == 0
}

not_owed contains "the group is known to be below the lower exposure action values now" if {
	changed
	count(papers) > 0
	not concerned
}

owed if {
	concerned
	count(papers) > 0
}

changed if {
	some change in input.changes
	change.raises_exposure != "no"
}

# At or above a lower action value now, or not known to be below.
concerned if common.any_current(input.exposed.lower)

concerned if {
	some stretch in input.exposure_unknown.lower
	common.covers(stretch, input.as_of)
}

papers := [paper | some paper in input.documents; paper.kind == "risk_assessment"]

of_unknown_effect := [change | some change in input.changes; not change.raises_exposure in ["yes", "no"]]

reviewed_since(change) := [paper.ref |
	some paper in papers
	max([day | some day in [paper.date, paper.reviewed_on]; day != null]) >= change.date
]
