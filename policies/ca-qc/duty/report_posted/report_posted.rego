# METADATA
# title: Measurement report posted
# description: >-
#   A report of a measurement is posted, or otherwise made known to the workers, not later than 15 days after it is
#   available.
# custom:
#   cite: r. 13, s. 141.4
#   subject: site
#   topic: information
#   severity: major
#   evidence: [document]
#   remedy: Post the report now where the workers see it, and record from which day on.
package duty.report_posted

import data.common
import rego.v2

obligations contains {
	"key": name(report),
	"after": report.date,
	"within": "posting_delay",
	"by": posting(report),
	"note": sprintf("report of %s", [report.date]),
	"because": [report.ref],
} if {
	some report in reports
}

not_owed contains "no report of a measurement became available since the section came into force" if count(reports) == 0

posting(report) := {"date": report.posted_on, "ref": report.ref} if {
	report.posted_on != null
} else := null

# The reports that became available since the section came into force.
reports := [paper |
	some paper in input.documents
	paper.kind == "noise_measurement_report"
	common.at(data.parameters.sections_in_force, paper.date) != null
]

name(paper) := concat("/", array.concat([paper.date], paper.covers))
