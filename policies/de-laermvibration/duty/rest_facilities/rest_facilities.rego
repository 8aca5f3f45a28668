# METADATA
# title: Quiet rest rooms
# description: >-
#   In rest rooms noise is reduced as far as possible, taking account of their purpose and the conditions of use.
# custom:
#   cite: LärmVibrationsArbSchV § 7(3)
#   subject: site
#   topic: controls
#   severity: minor
#   evidence: [document]
#   remedy: Have the noise in rest rooms judged, and record the outcome.
package duty.rest_facilities

import rego.v2

obligations contains {
	"key": "now",
	"ask": "Is the noise in rest facilities brought down to a level that suits their purpose, or are there none?",
	"of": "safety professional",
	"by": latest,
	"facts": {"workers_at_or_above_the_lower_values": input.enrolled_now},
} if {
	in_noise
}

not_owed contains "nobody has been at or above the lower action values" if not in_noise

in_noise if input.enrolled_ever > 0

papers := [paper | some paper in input.documents; paper.kind == "rest_facilities"]

# Documents come oldest first.
latest := null if {
	count(papers) == 0
} else := {"date": paper.date, "ref": paper.ref} if {
	some paper in [papers[count(papers) - 1]]
}
