# METADATA
# title: Noise eliminated or reduced
# description: >-
#   The risk from exposure to noise is eliminated at source or, where that is not reasonably practicable, reduced to
#   as low a level as is reasonably practicable. What is reasonably practicable is a judgement.
# custom:
#   cite: Control of Noise at Work Regulations reg 6(1)
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement, control]
#   remedy: Have a competent person study how the noise can be eliminated or reduced, put what is reasonably practicable in place, and record the study.
package duty.noise_reduced

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"on": latest.date,
	"note": said[latest.feasible],
	"because": [latest.ref],
	"facts": facts,
} if {
	exposed
	count(not_in_place) == 0
	settled
}

obligations contains {
	"holds": false,
	"on": control.date,
	"note": sprintf("the control was found practicable and is not in place: %s", [named(control)]),
	"because": [control.ref],
	"facts": facts,
} if {
	exposed
	some control in not_in_place
}

obligations contains {
	"ask": "How can the noise of this group be eliminated or reduced as far as is reasonably practicable?",
	"of": "competent person",
	"because": common.refs(input.controls),
	"facts": facts,
} if {
	exposed
	count(not_in_place) == 0
	not settled
}

not_owed contains "the group is not known to be at or above a lower exposure action value" if not exposed

exposed if common.any_current(input.exposed.lower)

latest := input.controls[count(input.controls) - 1]

settled if latest.feasible in ["yes", "no"]

# A control that was found practicable is owed until it is in place, or until a later record on the same control says
# otherwise.
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

said := {
	"yes": "what was found practicable is in place",
	"no": "the latest study found nothing further practicable",
}

facts := {"workers": input.workers, "controls": [control.what | some control in input.controls]}
