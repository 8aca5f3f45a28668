# METADATA
# title: Report posted for three months
# description: >-
#   A posted report stays readily accessible to the workers, in a visible place, for at least three months.
# custom:
#   cite: r. 13, s. 141.4
#   subject: site
#   topic: information
#   severity: minor
#   evidence: [document]
#   remedy: Post the report again until it has been up for three months, and record the days.
package duty.report_stays_posted

import data.common
import rego.v2

obligations contains {
	"key": name(report),
	"on": report.posted_on,
	"holds": up_long_enough(report),
	"note": said[up_long_enough(report)],
	"because": [report.ref],
	"facts": {"posted_on": report.posted_on, "posted_to": report.posted_to, "to_stay_until": report.post_until},
} if {
	some report in reports
	report.post_until != null
}

not_owed contains "no report was posted since the section came into force" if {
	every report in reports {
		report.post_until == null
	}
}

# What is still up is long enough.
up_long_enough(report) if report.posted_to == null

up_long_enough(report) := report.posted_to >= report.post_until if report.posted_to != null

said := {
	true: null,
	false: "the report was taken down before its three months were over",
}

# The reports that became available since the section came into force.
reports := [paper |
	some paper in input.documents
	paper.kind == "noise_measurement_report"
	common.at(data.parameters.sections_in_force, paper.date) != null
]

name(paper) := concat("/", array.concat([paper.date], paper.covers))
