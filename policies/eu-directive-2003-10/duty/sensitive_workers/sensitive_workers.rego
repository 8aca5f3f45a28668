# METADATA
# title: Workers of sensitive groups
# description: >-
#   The measures are adapted to the requirements of workers who belong to particularly sensitive risk groups.
# custom:
#   cite: Directive 2003/10/EC Art 5(5)
#   subject: site
#   topic: controls
#   severity: minor
#   evidence: [document]
#   remedy: Have the measures judged for sensitive workers, and record the outcome.
package duty.sensitive_workers

import rego.v2

obligations contains {
	"key": "now",
	"ask": "Are the measures adapted to workers who belong to sensitive groups, or is nobody of them exposed?",
	"of": "occupational physician",
	"by": latest,
	"facts": {"workers_at_or_above_the_lower_values": input.enrolled_now},
} if {
	in_noise
}

not_owed contains "nobody has been at or above the lower action values" if not in_noise

in_noise if input.enrolled_ever > 0

papers := [paper | some paper in input.documents; paper.kind == "sensitive_workers"]

# Documents come oldest first.
latest := null if {
	count(papers) == 0
} else := {"date": paper.date, "ref": paper.ref} if {
	some paper in [papers[count(papers) - 1]]
}
