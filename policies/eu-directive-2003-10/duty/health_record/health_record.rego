# METADATA
# title: Individual health records
# description: >-
#   For each worker under surveillance an individual health record is made and kept up to date, with a summary of the
#   results, in a form in which it can be consulted later.
# custom:
#   cite: Directive 2003/10/EC Art 10(3)
#   subject: site
#   topic: records
#   severity: major
#   evidence: [document]
#   remedy: Arrange that individual health records are kept, and record where.
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

said := "no record shows that individual health records are kept" if count(papers) == 0

else := null
