# METADATA
# title: Competent persons
# description: >-
#   Only competent persons assess the risk, above all the occupational physician or the safety professional, and only
#   those with the competence and equipment for it measure.
# custom:
#   cite: LärmVibrationsArbSchV § 5
#   subject: site
#   topic: monitoring
#   severity: minor
#   evidence: [document]
#   remedy: Keep proof of the competence of those who assess and measure.
package duty.competent_services

import data.common
import rego.v2

obligations contains {
	"holds": count(papers) > 0,
	"note": said,
	"because": common.refs(papers),
	"facts": {"workers_at_or_above_the_lower_values": input.enrolled_now},
} if {
	in_noise
}

not_owed contains "nobody has been at or above the lower action values" if not in_noise

in_noise if input.enrolled_ever > 0

papers := [paper | some paper in input.documents; paper.kind == "competence"]

said := "no record shows that those who assess and measure are competent for it" if count(papers) == 0

else := null
