# METADATA
# title: Health surveillance
# description: >-
#   Where the risk assessment shows a risk to the health of employees, they are placed under suitable health
#   surveillance, which includes testing of their hearing. The text sets no figure and no time; HSE reads it as
#   everybody who is regularly exposed at or above an upper exposure action value, and everybody at particular risk.
#   An offer on record shows that the worker was placed under surveillance; whether the worker came is told by
#   test-attended.
# custom:
#   cite: Control of Noise at Work Regulations reg 9(1)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [examination, audiogram, measurement]
#   remedy: Place the worker under health surveillance and offer a hearing test.
package duty.surveillance

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": sprintf("hearing tests offered or made: %d", [count(steps)]),
	"because": [steps[count(steps) - 1]],
} if {
	at_risk
	count(steps) > 0
}

obligations contains {
	"holds": false,
	"note": "exposure is at or above an upper exposure action value, and no hearing test was offered or made",
	"facts": {"exposed_since": common.current_since(input.exposed.upper)},
	"because": [exposure.ref | some exposure in input.exposures; exposure.to == null; exposure.ref != null],
} if {
	at_upper
	count(steps) == 0
}

not_owed contains "exposure is not known to be at or above an upper exposure action value, and no hearing damage is on record" if {
	not at_risk
}

# At particular risk is, between the action values, who is known to have hearing damage.
at_risk if at_upper

at_risk if {
	common.any_current(input.exposed.lower)
	some examination in input.examinations
	examination.damage == true
}

at_upper if common.any_current(input.exposed.upper)

steps := array.concat(
	[audiogram.ref | some audiogram in input.audiograms; audiogram.invalidated == false],
	[examination.ref | some examination in input.examinations; examination.kind == "hearing_test"],
)
