# METADATA
# title: Health surveillance arranged
# description: >-
#   Where the assessment shows a risk to health, workers have appropriate health surveillance under national law and
#   practice. Above the upper action values there is something to survey in any case; below them the risk is judged.
# custom:
#   cite: Directive 2003/10/EC Art 10(1)
#   subject: site
#   topic: audiometry
#   severity: major
#   evidence: [document]
#   remedy: Arrange the surveillance, and record how it is carried out.
package duty.health_surveillance

import data.common
import rego.v2

obligations contains {
	"holds": count(papers) > 0,
	"note": said,
	"because": common.refs(papers),
	"facts": {"workers_at_or_above_the_lower_values": input.enrolled_now},
} if {
	above_the_upper
}

obligations contains {
	"key": "risk",
	"ask": "Does the assessment show a risk to the health of workers, so that health surveillance is to be arranged?",
	"of": "occupational physician",
	"by": latest,
	"facts": {"workers_at_or_above_the_lower_values": input.enrolled_now},
} if {
	in_noise
	not above_the_upper
}

not_owed contains "nobody has been at or above the lower action values" if {
	not in_noise
	not above_the_upper
}

in_noise if input.enrolled_ever > 0

above_the_upper if "upper_exceeded" in input.levels_now

# Documents come oldest first.
latest := null if {
	count(papers) == 0
} else := {"date": paper.date, "ref": paper.ref} if {
	some paper in [papers[count(papers) - 1]]
}

papers := [paper | some paper in input.documents; paper.kind in {"surveillance_arrangement", "health_surveillance"}]

said := "no arrangement for health surveillance is on record" if count(papers) == 0

else := null
