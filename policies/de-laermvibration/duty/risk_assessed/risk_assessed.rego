# METADATA
# title: Risk assessment documented
# description: >-
#   The assessment of the risk from noise (Gefährdungsbeurteilung) is documented whatever the number of workers, with
#   the hazards that may occur and the measures that must be carried out.
# custom:
#   cite: LärmVibrationsArbSchV § 3(1), (4)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [document, group]
#   remedy: Document the assessment of the group's noise and the measures that follow from it.
package duty.risk_assessed

import data.common
import rego.v2

obligations contains {
	"holds": count(papers) > 0,
	"note": said,
	"because": common.refs(papers),
	"facts": {"workers": input.workers, "reviewed_on": [paper.reviewed_on | some paper in papers]},
} if {
	in_noise
}

obligations contains {
	"holds": null,
	"missing": ["whether the group works in noise"],
	"note": "no assessment is on record, and nobody has said whether the group works in noise",
} if {
	nobody_knows
	count(papers) == 0
}

not_owed contains "nothing suggests that the group works in noise" if {
	not in_noise
	input.suspected_noisy == false
}

not_owed contains "nobody has said whether the group works in noise, but it was assessed" if {
	nobody_knows
	count(papers) > 0
}

not_owed contains "measured below the lower action values, and nobody suspects noise" if {
	not in_noise
	input.suspected_noisy == null
	not nobody_knows
}

# Noise that is suspected is assessed in writing, also where it turns out to stay below the lower action values.
in_noise if common.any_current(input.exposed.lower_reached)

in_noise if input.suspected_noisy == true

nobody_knows if {
	not in_noise
	input.suspected_noisy == null
	some stretch in input.exposure_unknown.lower_reached
	common.covers(stretch, input.as_of)
}

papers := [paper | some paper in input.documents; paper.kind == "risk_assessment"]

said := "no risk assessment of the group's noise is on record" if count(papers) == 0

else := null
