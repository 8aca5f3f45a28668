# METADATA
# title: Report of the measurement
# description: >-
#   A measurement is described in a report with set contents. What the contents are was not read; from memory. The
#   report of the latest measurement of each situation is asked for.
# custom:
#   cite: r. 13, ss. 141.1 to 141.3
#   subject: group
#   topic: records
#   severity: minor
#   evidence: [measurement, document]
#   remedy: File a dated report of the measurement that names it.
package duty.measurement_report

import data.common
import rego.v2

obligations contains {
	"key": latest.id,
	"after": latest.date,
	"by": report,
	"note": sprintf("measurement of %s", [latest.date]),
	"because": [latest.ref],
} if {
	count(measured) > 0
}

not_owed contains "the situation was not measured since the section came into force" if count(measured) == 0

measured := [m |
	some m in input.measurements
	common.at(data.parameters.sections_in_force, m.date) != null
]

latest := measured[count(measured) - 1]

report := {"date": reports[0][0], "ref": reports[0][1]} if {
	reports := sort([[paper.date, paper.ref] |
		some paper in input.documents
		paper.kind == "noise_measurement_report"
		about_latest(paper)
	])
	count(reports) > 0
} else := null

about_latest(paper) if latest.id in paper.covers

about_latest(paper) if {
	count(paper.covers) == 0
	paper.date >= latest.date
}
