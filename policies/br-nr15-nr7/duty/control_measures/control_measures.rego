# METADATA
# title: Controls at the source come first
# description: >-
#   Where exposure is above the tolerance limit, collective and organizational measures come before protectors,
#   which are supplied where such measures are not feasible, do not suffice, or are still being put in place. What
#   is feasible is a judgement.
# custom:
#   cite: NR-6 6.5.1 (secondary source)
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement, control]
#   remedy: >-
#     Have a competent person study collective and organizational measures, put the feasible ones in place, and
#     record the study.
package duty.control_measures

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"on": latest.date,
	"because": [latest.ref],
	"facts": facts,
} if {
	above_limit
	count(not_in_place) == 0
	answered
}

obligations contains {
	"key": sprintf("control/%s", [control.date]),
	"holds": false,
	"on": control.date,
	"note": sprintf("the measure was found feasible and is not in place: %s", [named(control)]),
	"because": [control.ref],
	"facts": facts,
} if {
	above_limit
	some control in not_in_place
}

obligations contains {
	"ask": "Which collective or organizational measures against the noise are feasible for this group?",
	"of": "occupational safety engineer",
	"because": common.refs(input.controls),
	"facts": facts,
} if {
	above_limit
	count(not_in_place) == 0
	not answered
}

not_owed contains "the group is not known to be above the tolerance limit" if not above_limit

above_limit if common.any_current(input.exposed.limit)

latest := input.controls[count(input.controls) - 1]

answered if latest.feasible in {"yes", "no"}

# What was found feasible is owed until it is in place, or until a later record on the same measure says otherwise.
not_in_place := [control |
	some i, control in input.controls
	control.feasible == "yes"
	control.installed_on == null
	count([later | some j, later in input.controls; j > i; later.what == control.what]) == 0
]

named(control) := control.what if {
	control.what != null
} else := sprintf("the one of %s", [control.date])

facts := {"workers": input.workers, "measures": [control.what | some control in input.controls]}
