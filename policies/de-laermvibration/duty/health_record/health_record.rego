# METADATA
# title: Files of the physician kept (guidance)
# description: >-
#   The physician keeps the files for at least ten years after the last appointment; for work that leads to
#   occupational diseases after long latency, 40 years. They are not the employer's, who can only show how they are
#   kept.
# custom:
#   cite: AMR 6.1 no 3
#   subject: site
#   topic: records
#   severity: minor
#   evidence: [document]
#   remedy: Ask the physician how the files are kept, and record it.
package duty.health_record

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

papers := [paper | some paper in input.documents; paper.kind == "health_records"]

said := "no record shows how the physician keeps the files" if count(papers) == 0

else := null
