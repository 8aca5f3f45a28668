# METADATA
# title: Yearly review of the program
# description: >-
#   The noise management program is reviewed at least once a year: whether education is effective, whether more must
#   be measured, whether control is adequate; since 31 March 2023 the whole program.
# custom:
#   cite: OHS Code, s. 221
#   subject: site
#   topic: records
#   severity: major
#   evidence: [document]
#   remedy: Review the program now, and record the day of the review.
package duty.program_reviewed

import rego.v2

obligations contains {
	"every": "program_review_interval",
	"during": {"from": max([papers[0].date, data.parameters.program_review_interval.values[0].from]), "to": null},
	"by": ["document.hearing_conservation_programme", "document.written_program"],
	"because": [papers[0].ref],
} if {
	owed
	count(papers) > 0
}

not_owed contains "nobody is known to be exposed to excess noise now" if not owed

not_owed contains "there is no program yet, which is a finding of its own" if {
	owed
	count(papers) == 0
}

owed if input.enrolled_now > 0

papers := [paper |
	some paper in input.documents
	paper.kind in ["hearing_conservation_programme", "written_program"]
]
