# METADATA
# title: Annual analytical report
# description: >-
#   The physician in charge of the PCMSO draws up an analytical report (relatório analítico) every year. It is a
#   document of kind analytical_report, with its date.
# custom:
#   cite: NR-7 7.6.2
#   subject: site
#   topic: reporting
#   severity: major
#   evidence: [document]
#   remedy: >-
#     Have the report of the year drawn up and file it with its date.
package duty.annual_report

import rego.v2

obligations contains {
	"every": "report_interval",
	"during": {"from": max([reports[0].date, asked_since]), "to": null},
	"by": "document.analytical_report",
	"because": [reports[0].ref],
} if {
	concerned
	count(reports) > 0
}

obligations contains {
	"holds": false,
	"note": "no analytical report is on record",
} if {
	concerned
	count(reports) == 0
}

not_owed contains "no worker is employed and none was above the action level" if not concerned

concerned if input.workers > 0

concerned if input.enrolled_ever > 0

reports := [document | some document in input.documents; document.kind == "analytical_report"]

# A report from before the rule is followed by the next one within the interval from its first day.
asked_since := data.parameters.report_interval.values[0].from
