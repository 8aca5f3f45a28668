# METADATA
# title: Measures after the physician's report
# description: >-
#   Where the physician reports that the measures do not suffice, the employer reviews the assessment, takes the
#   measures needed without delay, and tells the works council and the authority of them.
# custom:
#   cite: ArbMedVV § 6(4), § 8(1)-(2)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, examination]
#   remedy: Do what lacks, and record it for the worker concerned.
package duty.measures_after_report

import rego.v2

# Without delay; the law sets no time.
obligations contains {
	"key": sprintf("%s of %s", [what.key, report.said.ref]),
	"after": report.said.date,
	"by": first_of(what.kinds, report),
	"note": sprintf("the physician reports that the measures do not suffice: %s", [what.words]),
	"because": [report.examination.ref, report.said.ref],
} if {
	some report in reports
	some what in asked
}

not_owed contains "no report of a physician that the measures do not suffice is on record" if count(reports) == 0

reports := [{"examination": examination, "said": done} |
	some examination in input.examinations
	some done in examination.follow_ups
	done.result == "measures_insufficient"
]

asked := [
	{"key": "assessment", "kinds": {"assessment_reviewed"}, "words": "the risk assessment is reviewed"},
	{"key": "measures", "kinds": {"measures_reviewed", "controls_reviewed", "alternative_work"}, "words": "the measures needed are taken"},
	{"key": "report", "kinds": {"authority_report"}, "words": "the works council and the authority are told of the measures"},
]

first_of(kinds, report) := {"date": done.date, "ref": done.ref} if {
	done := [done |
		some done in report.examination.follow_ups
		done.kind in kinds
		done.date >= report.said.date
	][0]
} else := null
