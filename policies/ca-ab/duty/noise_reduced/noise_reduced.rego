# METADATA
# title: Noise reduced as far as practicable
# description: >-
#   All reasonably practicable measures are used to reduce the noise in areas where workers may be present. What is
#   reasonably practicable is a judgement; it is asked for where the exposure is above the level of assessment.
# custom:
#   cite: OHS Code, s. 216
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement, control]
#   remedy: Have a competent person study the measures, put the reasonably practicable ones in place, and record the study.
package duty.noise_reduced

import data.common
import rego.v2

obligations contains {
	"holds": false,
	"key": sprintf("%s/%s", [control.date, control.what]),
	"on": control.date,
	"note": sprintf("the measure was found reasonably practicable and is not in place: %s", [control.what]),
	"because": [control.ref],
} if {
	above
	some control in not_in_place
}

obligations contains {
	"key": "measures",
	"ask": "Which measures are reasonably practicable to reduce the noise of this group?",
	"of": "competent person (engineering)",
	"by": answer,
	"because": common.refs(input.controls),
	"facts": {"workers": input.workers, "measures": [control.what | some control in input.controls]},
} if {
	above
	count(not_in_place) == 0
}

not_owed contains "the exposure is not known to be above the level of assessment now" if not above

above if common.any_current(input.exposed.assessment)

# A measure is owed until it is in place, or until a later record on the same measure says otherwise.
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

answer := {"date": latest.date, "ref": latest.ref} if {
	latest := input.controls[count(input.controls) - 1]
	latest.feasible in ["yes", "no"]
} else := null
