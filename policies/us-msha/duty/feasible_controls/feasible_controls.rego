# METADATA
# title: Feasible controls
# description: >-
#   The operator assures that no miner is exposed during any work shift above the permissible exposure level. If one is,
#   the operator uses all feasible engineering and administrative controls to reduce the exposure to it. What is
#   feasible is a judgement; a control found feasible is owed until it is in place.
# custom:
#   cite: 30 CFR 62.130(a)
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement, control]
#   remedy: Have a competent person study engineering and administrative controls, put all feasible ones in place, and record the study.
package duty.feasible_controls

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"on": latest_control.date,
	"because": [latest_control.ref],
	"facts": facts,
} if {
	above_limit
	controlled
}

obligations contains {
	"holds": false,
	"on": control.date,
	"note": sprintf("the control was found feasible and is not in place: %s", [named(control)]),
	"because": [control.ref],
	"facts": facts,
} if {
	above_limit
	some control in not_in_place
}

obligations contains {
	"ask": "Which engineering and administrative controls are feasible for this group?",
	"of": "competent person (engineering)",
	"because": common.refs(input.controls),
	"facts": facts,
} if {
	above_limit
	count(not_in_place) == 0
	not controlled
}

obligations contains {
	"holds": null,
	"note": sprintf("it is not known whether the group is above the permissible exposure: %s", [concat("; ", reasons_not_known)]),
	"missing": ["an exposure that can be held against the permissible exposure"],
	"facts": facts,
} if {
	not above_limit
	count(reasons_not_known) > 0
}

not_owed contains "the group is not above the permissible exposure, or was never measured" if {
	not above_limit
	count(reasons_not_known) == 0
}

above_limit if common.any_current(input.exposed.limit)

# A group that was never measured is the matter of 62.110(a), not of this duty.
reasons_not_known := [stretch.reason |
	input.first_survey != null
	some stretch in input.exposure_unknown.limit
	common.covers(stretch, input.as_of)
]

latest_control := input.controls[count(input.controls) - 1]

# A control that was found feasible is owed until it is in place, or until a later record on the same control says
# otherwise. What was found of another control does not replace it.
not_in_place := [control |
	some i, control in input.controls
	control.feasible == "yes"
	control.installed_on == null
	not replaced(i)
]

replaced(i) if {
	some j, later in input.controls
	j > i
	later.what == input.controls[i].what
}

named(control) := control.what if {
	control.what != null
} else := sprintf("the one of %s", [control.date])

controlled if {
	count(not_in_place) == 0
	latest_control.feasible == "no"
}

controlled if {
	count(not_in_place) == 0
	latest_control.feasible == "yes"
}

facts := {"workers": input.workers, "controls": [control.what | some control in input.controls]}
