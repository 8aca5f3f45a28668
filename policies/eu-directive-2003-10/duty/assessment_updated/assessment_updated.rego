# METADATA
# title: Risk assessment kept up to date
# description: >-
#   The assessment is updated regularly, above all where significant changes could make it out of date or where health
#   surveillance shows the need.
# custom:
#   cite: Directive 2003/10/EC Art 4(7)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [document, change]
#   remedy: Review the assessment after the change and record the day.
package duty.assessment_updated

import rego.v2

# The law sets no time. The assessment of before the change does not fulfil it, a review since then does.
obligations contains {
	"key": change.id,
	"after": change.date,
	"by": "document.risk_assessment",
	"note": sprintf("on %s the noise of the group may have changed: %s", [change.date, about(change)]),
	"because": [change.ref],
} if {
	some change in material
	matters(change)
}

# Whether an assessment of before must change, nobody can tell before somebody has said what the change does.
obligations contains {
	"key": change.id,
	"holds": null,
	"note": sprintf("nobody has said whether the change of %s raises exposure: %s", [change.date, about(change)]),
	"missing": ["whether the change raises exposure, or a review of the assessment since"],
	"because": [change.ref],
} if {
	some change in material
	not matters(change)
}

not_owed contains "no risk assessment is on record, which is a finding of its own where one is owed" if count(papers) == 0

not_owed contains "no change that may matter to the assessment is on record" if {
	count(papers) > 0
	count(material) == 0
}

papers := [paper | some paper in input.documents; paper.kind == "risk_assessment"]

material := [change |
	count(papers) > 0
	not quiet
	some change in input.changes
	change.raises_exposure != "no"
]

# Nothing suggests that the group works in noise, and the change did not bring it there.
quiet if {
	input.suspected_noisy == false
	count([stretch | some stretch in input.exposed.lower_reached; stretch.current == true]) == 0
}

matters(change) if change.raises_exposure == "yes"

matters(change) if {
	some paper in papers
	some day in [paper.date, paper.reviewed_on]
	day >= change.date
}

about(change) := change.what if {
	change.what != null
} else := "what was changed is not recorded"
