# METADATA
# title: Noise prevented at source or reduced as far as possible
# description: >-
#   Measures by the state of the art exclude the risk or reduce it as far as possible, in this order: at the source,
#   technical before organisational, and both before hearing protectors.
# custom:
#   cite: LärmVibrationsArbSchV § 7(1)-(2)
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [control, document]
#   remedy: Study how the noise can be reduced at its source, put in place what is feasible, and record both.
package duty.risk_eliminated

import data.common
import rego.v2

obligations contains {
	"key": "considered",
	"holds": count(considered) > 0,
	"note": said,
	"because": considered,
	"facts": {"workers": input.workers},
} if {
	lower_reached_now
}

# A measure found feasible is owed until it is in place; the law sets no time.
obligations contains {
	"key": control.ref,
	"after": control.date,
	"by": installed(control),
	"note": sprintf("found feasible: %s", [about(control)]),
	"because": [control.ref],
} if {
	lower_reached_now
	some control in input.controls
	control.feasible == "yes"
}

not_owed contains "the records do not show exposure at or above the lower action values now" if not lower_reached_now

lower_reached_now if common.any_current(input.exposed.lower_reached)

considered := array.concat(
	common.refs(input.controls),
	[paper.ref | some paper in input.documents; paper.kind in {"means_register", "control_programme"}],
)

installed(control) := null if {
	control.installed_on == null
} else := {"date": control.installed_on, "ref": control.ref}

about(control) := "a measure against noise" if {
	control.what == null
} else := control.what

said := "no record shows that noise was removed at its source or reduced to a minimum, or that this was studied" if count(considered) == 0

else := null
