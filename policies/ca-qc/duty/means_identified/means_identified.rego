# METADATA
# title: Reasonable means identified
# description: >-
#   The evaluation of a situation above a limit says which reasonable means there are: at the source by replacement,
#   maintenance or corrective work, on the way by enclosing or soundproofing, or on the exposure by an isolated
#   workstation. All means found reasonable are implemented even if they are not enough to reach the limit. What is
#   reasonable is a judgement.
# custom:
#   cite: r. 13, s. 135
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [document, control]
#   remedy: Have a competent person study the means at the source and beside it, and record each with its finding.
package duty.means_identified

import data.common
import rego.v2

obligations contains {
	"key": latest.date,
	"ask": "Which reasonable means did the evaluation find for this situation?",
	"of": "competent person (engineering)",
	"by": answer,
	"because": array.concat([latest.ref], common.refs(since)),
	"facts": {"workers": input.workers, "means": [control.what | some control in since]},
} if {
	above_limit
	count(counted) > 0
}

not_owed contains "the situation is not above a limit now" if not above_limit

not_owed contains "there is no evaluation yet, which is the matter of section 133" if {
	above_limit
	count(counted) == 0
}

above_limit if common.any_current(input.exposed.limit)

latest := counted[count(counted) - 1]

since := [control | some control in input.controls; control.date >= latest.date]

# A study whose finding is still open is no answer.
answer := {"date": found[0][0], "ref": found[0][1]} if {
	found := sort([[control.date, control.ref] |
		some control in since
		control.feasible in ["yes", "no"]
	])
	count(found) > 0
} else := null

counted := [evaluation | some evaluation in input.evaluations; counts(evaluation)]

counts(evaluation) if evaluation.early == false

counts(evaluation) if {
	evaluation.early
	input.choices.early_evaluation == "counted"
}
