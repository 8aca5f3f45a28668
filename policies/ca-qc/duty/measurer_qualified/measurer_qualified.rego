# METADATA
# title: Measured by a qualified person
# description: >-
#   Measurements are made by a qualified person. Who is qualified was not read; from memory. A document on the
#   competence of whoever measures is asked for.
# custom:
#   cite: r. 13, ss. 141.1 to 141.3
#   subject: site
#   topic: monitoring
#   severity: minor
#   evidence: [measurement, document]
#   remedy: File what shows the competence of the person who measures.
package duty.measurer_qualified

import data.common
import rego.v2

obligations contains {
	"holds": count(papers) > 0,
	"note": note,
	"because": array.concat(common.refs([input.latest_measurement]), common.refs(papers)),
	"facts": {"measurements": input.measurements},
} if {
	measured
}

not_owed contains "nothing was measured since the section came into force" if not measured

measured if {
	input.latest_measurement != null
	common.at(data.parameters.sections_in_force, input.latest_measurement.date) != null
}

papers := [paper | some paper in input.documents; paper.kind == "competence"]

note := "no document shows the competence of whoever measures" if {
	count(papers) == 0
} else := null
