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
	under_surveillance
}

not_owed contains "nobody is above the upper action values, and no arrangement for health surveillance is on record" if {
	not under_surveillance
}

under_surveillance if "upper_exceeded" in input.levels_now

under_surveillance if {
	some paper in input.documents
	paper.kind in {"surveillance_arrangement", "health_surveillance"}
}

papers := [paper | some paper in input.documents; paper.kind == "health_records"]

said := "no record shows that individual health records are kept" if count(papers) == 0

else := null
