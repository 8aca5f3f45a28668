# METADATA
# title: Measured after a means was put in place
# description: >-
#   After a reasonable means was put in place the daily level and the peak are measured again. The time for it was not
#   read; from memory.
# custom:
#   cite: r. 13, s. 141
#   subject: group
#   topic: monitoring
#   severity: minor
#   evidence: [control, measurement]
#   remedy: Measure the situation again with the means in place.
package duty.measured_after_means

import data.common
import rego.v2

obligations contains {
	"key": sprintf("%s/%s", [control.installed_on, control.what]),
	"after": control.installed_on,
	"by": first_since(control.installed_on),
	"note": sprintf("%s was put in place on %s", [control.what, control.installed_on]),
	"because": [control.ref],
} if {
	some control in installed
}

not_owed contains "no means was put in place since the section came into force" if count(installed) == 0

installed := [control |
	some control in input.controls
	control.installed_on != null
	common.at(data.parameters.sections_in_force, control.installed_on) != null
]

first_since(day) := {"date": later[0][0], "ref": later[0][1]} if {
	later := sort([[m.date, m.ref] | some m in input.measurements; m.date >= day])
	count(later) > 0
} else := null
