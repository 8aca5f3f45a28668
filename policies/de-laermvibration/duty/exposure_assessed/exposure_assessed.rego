# METADATA
# title: Exposure of every worker determined
# description: >-
#   The employer first establishes whether workers are or may be exposed to noise, and determines and evaluates the
#   exposure at the workplace. That holds for each worker.
# custom:
#   cite: LärmVibrationsArbSchV § 3(1)
#   subject: worker
#   topic: monitoring
#   severity: major
#   evidence: [worker, assignment, measurement]
#   remedy: Put the worker into the group whose noise was determined, or determine the worker's own exposure.
package duty.exposure_assessed

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "the records show how the worker's exposure stands to all action values and to the limit",
	"because": deciding,
	"facts": {"working": input.exposure_working},
} if {
	employed_now
	count(open_now) == 0
}

obligations contains {
	"holds": false,
	"note": "the worker is in no group and has no measurement of their own, so nobody has assessed the exposure",
	"because": [sprintf("worker/%s", [input.id])],
} if {
	employed_now
	count(open_now) > 0
	nobody_asked
}

obligations contains {
	"holds": null,
	"note": sprintf("it is not known how the exposure stands: %s", [concat("; ", open_now)]),
	"missing": ["an exposure that can be held against the action values"],
	"because": deciding,
	"facts": {"working": input.exposure_working},
} if {
	employed_now
	count(open_now) > 0
	own
}

not_owed contains "not employed now" if not employed_now

not_owed contains "the exposure of the worker's group is not known, which is a finding of the group" if {
	employed_now
	count(open_now) > 0
	not nobody_asked
	not own
}

employed_now if common.any_current(input.employed)

# The action values and the limit as a whole: the level of the day or week, or the peak.
values := ["lower_reached", "lower_exceeded", "upper_reached", "upper_exceeded", "limit"]

open_now := common.reasons([stretch | some value in values; some stretch in input.exposure_unknown[value]], input.as_of)

exposures_now := [exposure | some exposure in input.exposures; common.covers(exposure, input.as_of)]

deciding := sort({exposure.ref | some exposure in exposures_now; exposure.ref != null})

own if {
	some exposure in exposures_now
	exposure.own == true
}

nobody_asked if {
	count(deciding) == 0
	count([exposure | some exposure in exposures_now; exposure.group != null]) == 0
}
