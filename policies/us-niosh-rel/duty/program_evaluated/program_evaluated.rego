# METADATA
# title: Yearly evaluation of the program (recommended)
# description: >-
#   The hearing loss prevention program is evaluated at least once a year, by what became of single workers and of the
#   group as a whole. Each written program, and each day on which it was reviewed, counts as an evaluation.
# custom:
#   cite: NIOSH 98-126, 1.9 (from memory)
#   subject: site
#   topic: reporting
#   severity: minor
#   evidence: [document]
#   remedy: >-
#     Evaluate the program by its individual and group results, and enter the day as the review of the document of kind
#     written_program.
package duty.program_evaluated

import rego.v2

obligations contains {
	"every": "evaluation_interval",
	"during": {"from": papers[0].date, "to": null},
	"by": "document.written_program",
	"because": [papers[0].ref],
} if {
	concerned
	count(papers) > 0
}

obligations contains {"holds": false, "note": "no written program and no evaluation of it is on record"} if {
	concerned
	count(papers) == 0
}

not_owed contains "nobody is at or above the REL now" if not concerned

concerned if input.enrolled_now > 0

papers := [paper | some paper in input.documents; paper.kind == "written_program"]
