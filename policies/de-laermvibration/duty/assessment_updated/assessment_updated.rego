# METADATA
# title: Risk assessment kept up to date
# description: >-
#   The assessment is updated where material changes of working conditions or findings of occupational health care
#   make that necessary.
# custom:
#   cite: LärmVibrationsArbSchV § 3(4)
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
}

not_owed contains "no change that may matter to the assessment is on record" if count(material) == 0

material := [change | some change in input.changes; change.raises_exposure != "no"]

about(change) := change.what if {
	change.what != null
} else := "what was changed is not recorded"
