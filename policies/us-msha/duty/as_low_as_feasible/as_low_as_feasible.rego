# METADATA
# title: As low as feasible
# description: >-
#   If, despite the use of all feasible engineering and administrative controls, a miner's exposure still exceeds the
#   permissible exposure level, the operator continues to use the controls to reduce it to as low a level as is
#   feasible. Whether it is as low is a judgement; a study that finds no further control feasible answers it.
# custom:
#   cite: 30 CFR 62.130(b)
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement, control]
#   remedy: Have a competent person judge whether more can be done, keep the controls in use, and record the study with its finding.
package duty.as_low_as_feasible

import data.common
import rego.v2

obligations contains {
	"ask": "Do the controls in use bring the exposure as low as is feasible?",
	"of": "competent person (engineering)",
	"by": answer,
	"note": "exposure is above the permissible exposure level with controls in place",
	"because": common.refs(in_place),
	"facts": {"workers": input.workers, "controls": [control.what | some control in in_place]},
} if {
	applies
}

not_owed contains "exposure is not known to be above the permissible exposure level now" if not above_limit

not_owed contains "no control is in place, which is the matter of feasible-controls" if {
	above_limit
	count(in_place) == 0
}

not_owed contains "a feasible control is not in place yet, which is the matter of feasible-controls" if {
	above_limit
	count(in_place) > 0
	pending
}

applies if {
	above_limit
	count(in_place) > 0
	not pending
}

above_limit if common.any_current(input.exposed.limit)

in_place := [control | some control in input.controls; control.installed_on != null]

# Found feasible and not in place, with no later record on the same control.
pending if {
	some i, control in input.controls
	control.feasible == "yes"
	control.installed_on == null
	not replaced(i)
}

replaced(i) if {
	some j, later in input.controls
	j > i
	later.what == input.controls[i].what
}

# A study since the last control was put in place that found nothing more to be feasible.
studies := [control |
	some control in input.controls
	control.feasible == "no"
	control.date >= max([done.installed_on | some done in in_place])
]

answer := {"date": studies[0].date, "ref": studies[0].ref} if {
	count(studies) > 0
} else := null
