# METADATA
# title: Quiet rest facilities
# description: >-
#   Where a worker has the use of rest facilities under the employer's responsibility, noise in them is brought down
#   to a level that suits their purpose.
# custom:
#   cite: Directive 2003/10/EC Art 5(4)
#   subject: site
#   topic: controls
#   severity: minor
#   evidence: [document]
#   remedy: Have the noise in rest facilities judged, and record the outcome.
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
