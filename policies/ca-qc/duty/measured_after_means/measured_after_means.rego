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
	"key": day,
	"after": day,
	"by": first_since(day),
	"note": sprintf("%s put in place on %s; by when to measure again was not read", [concat(", ", [control.what | some control in of_day]), day]),
	"because": common.refs(of_day),
} if {
	some day in {control.installed_on | some control in installed}
	of_day := [control | some control in installed; control.installed_on == day]
}

not_owed contains "no means was put in place in a situation at risk since the section came into force" if count(installed) == 0

at_risk if count(input.exposed.limit) > 0

at_risk if input.suspected_noisy == true

# What is put in place for a whole area says nothing of its quiet situations.
installed := [control |
	at_risk
	some control in input.controls
	control.installed_on != null
	common.at(data.parameters.sections_in_force, control.installed_on) != null
]

first_since(day) := {"date": later[0][0], "ref": later[0][1]} if {
	later := sort([[m.date, m.ref] | some m in input.measurements; m.date >= day])
	count(later) > 0
} else := null
