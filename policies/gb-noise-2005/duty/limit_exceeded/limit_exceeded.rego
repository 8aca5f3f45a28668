# METADATA
# title: Action after a limit value was exceeded
# description: >-
#   If an exposure limit value is exceeded, the employer forthwith reduces exposure below it, finds out why it was
#   exceeded, and changes the measures so that it is not exceeded again. Each record of such an event names all
#   three.
# custom:
#   cite: Control of Noise at Work Regulations reg 6(4)(b)
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [document]
#   remedy: Reduce exposure below the limit value at once, find the reason, change the measures, and record all three.
package duty.limit_exceeded

import data.common
import rego.v2

obligations contains object.union(verdict(paper), {
	"key": paper.date,
	"on": paper.date,
	"because": [paper.ref],
	"facts": {"covers": paper.covers, "workers": input.workers},
}) if {
	some paper in papers
}

verdict(paper) := {
	"holds": null,
	"missing": ["the actions that are to be taken on that day"],
	"note": "no list of the actions is in force on the day of the record",
} if {
	required(paper) == null
} else := {
	"holds": null,
	"missing": ["what was done"],
	"note": sprintf("a limit value was exceeded on %s, and the record does not say what was done", [paper.date]),
} if {
	count(paper.covers) == 0
} else := {
	"holds": false,
	"note": sprintf("a limit value was exceeded on %s, and the record lacks: %s", [paper.date, common.in_words(lacking(paper))]),
} if {
	count(lacking(paper)) > 0
} else := {
	"holds": true,
	"note": sprintf("a limit value was exceeded on %s, and all three actions are on record", [paper.date]),
}

required(paper) := common.at(data.parameters.limit_exceeded_actions, paper.date)

lacking(paper) := [word | some word in required(paper); not word in paper.covers]

papers := [paper | some paper in input.documents; paper.kind == "limit_exceeded"]

not_owed contains "no record says that a limit value was exceeded" if count(papers) == 0
