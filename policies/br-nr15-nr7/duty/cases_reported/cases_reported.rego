# METADATA
# title: Hearing cases in the annual report
# description: >-
#   The physician in charge of the PCMSO includes the cases of triggering or worsening, and altered reference
#   exams, in the annual analytical report. The record is the report, which names hearing_cases in covers;
#   a report of a year without a case says that there was none.
# custom:
#   cite: NR-7 Annex II items 9 b and 10 (from memory)
#   subject: site
#   topic: reporting
#   severity: minor
#   evidence: [document]
#   remedy: >-
#     Add the hearing cases of the year, or that there were none, to the analytical report, and name hearing_cases in covers.
package duty.cases_reported

import rego.v2

obligations contains {
	"holds": null,
	"note": "the record of the latest report does not say what it holds",
	"missing": ["what the latest analytical report holds"],
	"because": [latest.ref],
} if {
	concerned
	count(latest.covers) == 0
}

obligations contains {
	"holds": "hearing_cases" in latest.covers,
	"on": latest.date,
	"note": said,
	"because": [latest.ref],
	"facts": {"holds": latest.covers},
} if {
	concerned
	count(latest.covers) > 0
}

not_owed contains "no analytical report is on record, which is a finding of its own" if count(reports) == 0

not_owed contains "no worker of the site is known to be above the action level" if {
	count(reports) > 0
	not concerned
}

concerned if {
	count(reports) > 0
	input.enrolled_ever > 0
}

said := sprintf("the analytical report of %s names the cases of hearing loss", [latest.date]) if {
	"hearing_cases" in latest.covers
} else := sprintf("the analytical report of %s names neither cases of hearing loss nor that there were none", [latest.date])

reports := [document | some document in input.documents; document.kind == "analytical_report"]

latest := reports[count(reports) - 1]
