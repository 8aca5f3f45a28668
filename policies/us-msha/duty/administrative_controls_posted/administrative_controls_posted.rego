# METADATA
# title: Administrative controls posted
# description: >-
#   Where administrative controls are used, the operator posts their procedures on the mine bulletin board and gives a
#   copy to the affected miners.
# custom:
#   cite: 30 CFR 62.130(a)
#   subject: group
#   topic: controls
#   severity: minor
#   evidence: [control, document]
#   remedy: >-
#     Post the procedures on the mine bulletin board, hand a copy to each affected miner, and record both (document
#     controls_posted, with posted_on, covers copies_to_miners).
package duty.administrative_controls_posted

import data.common
import rego.v2

obligations contains object.union(posting, {"key": "posted", "because": because}) if used

obligations contains object.union(copies, {"key": "copies", "because": because}) if used

not_owed contains "no administrative control is in use" if not used

used if count(in_use) > 0

in_use := [control |
	some control in input.controls
	control.kind == "administrative"
	control.installed_on != null
]

papers := [paper | some paper in input.documents; paper.kind == "controls_posted"]

because := array.concat(common.refs(in_use), common.refs(papers))

on_the_board := [paper |
	some paper in papers
	paper.posted_on != null
	common.covers({"from": paper.posted_on, "to": paper.posted_to}, input.as_of)
]

posting := {"holds": true} if {
	count(on_the_board) > 0
} else := {
	"holds": null,
	"note": "the document does not say whether the procedures were posted",
	"missing": ["the day on which the procedures were posted"],
} if {
	some paper in papers
	paper.posted_on == null
} else := {"holds": false, "note": "administrative controls are in use, and no record shows that their procedures are posted"}

copies := {"holds": true} if {
	some paper in papers
	"copies_to_miners" in paper.covers
} else := {
	"holds": null,
	"note": "the document does not say whether the miners were given copies",
	"missing": ["what the document covers"],
} if {
	some paper in papers
	count(paper.covers) == 0
} else := {"holds": false, "note": "administrative controls are in use, and no record shows that the miners were given copies of their procedures"}
