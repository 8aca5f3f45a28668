# METADATA
# title: Feasible controls (recommended)
# description: >-
#   Where workers are at or above the REL, engineering controls, administrative controls and work practices are used as
#   far as feasible. What is feasible is a judgement. Exposure at or above the REL is no finding by itself as long as
#   all that was found feasible is in place.
# custom:
#   cite: NIOSH 98-126, 1.1, 1.4 (from memory)
#   subject: group
#   topic: controls
#   severity: minor
#   evidence: [measurement, control]
#   remedy: >-
#     Have a competent person study engineering and administrative controls, put the feasible ones in place, and record
#     the study.
package duty.feasible_controls

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"on": latest_control.date,
	"because": [latest_control.ref],
	"facts": facts,
} if {
	at_the_rel
	controlled
}

obligations contains {
	"holds": false,
	"on": control.date,
	"note": sprintf("the control was found feasible and is not in place: %s", [named(control)]),
	"because": [control.ref],
	"facts": facts,
} if {
	at_the_rel
	some control in not_in_place
}

obligations contains {
	"ask": "Which engineering or administrative controls are feasible for this group?",
	"of": "competent person (engineering)",
	"because": common.refs(input.controls),
	"facts": facts,
} if {
	at_the_rel
	count(not_in_place) == 0
	not controlled
}

obligations contains {
	"holds": null,
	"note": sprintf("it is not known whether the group is at or above the REL: %s", [concat("; ", reasons_not_known)]),
	"missing": ["an exposure that can be held against the REL"],
	"facts": facts,
} if {
	not at_the_rel
	count(reasons_not_known) > 0
}

not_owed contains "the group is not at or above the REL, or was never measured" if {
	not at_the_rel
	count(reasons_not_known) == 0
}

at_the_rel if common.any_current(input.exposed.rel)

# A group that was never measured is the matter of initial-assessment, not of this duty.
reasons_not_known := [stretch.reason |
	input.first_survey != null
	some stretch in input.exposure_unknown.rel
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
