# METADATA
# title: Representatives informed and trained
# description: >-
#   The representatives of employees at or above a lower exposure action value are given suitable information,
#   instruction and training, too.
# custom:
#   cite: Control of Noise at Work Regulations reg 10(1)
#   subject: site
#   topic: training
#   severity: minor
#   evidence: [document]
#   remedy: Inform and train the representatives of the employees exposed, and record it; where there are none, record that.
package duty.representatives_informed

import data.common
import rego.v2

obligations contains object.union(verdict, {"facts": {"workers_at_or_above_lower_value": input.enrolled_now}}) if exposed

verdict := {"holds": true, "note": "the information and training of representatives is on record", "because": common.refs(covering)} if {
	count(covering) > 0
} else := {
	"holds": null,
	"note": "a record of the kind does not say what it covers",
	"missing": ["what the record covers"],
	"because": common.refs(silent),
} if {
	count(silent) > 0
} else := {"holds": false, "note": "no record shows that representatives were informed and trained, or that there are none"}

not_owed contains "nobody is known to be at or above a lower exposure action value" if not exposed

exposed if "lower" in input.levels_now

papers := [paper | some paper in input.documents; paper.kind == "instruction"]

covering := [paper | some paper in papers; "representatives" in paper.covers]

silent := [paper | some paper in papers; count(paper.covers) == 0]
