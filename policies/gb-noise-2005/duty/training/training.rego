# METADATA
# title: Information, instruction and training
# description: >-
#   Where employees are likely to be exposed at or above a lower exposure action value, they are given suitable and
#   sufficient information, instruction and training. The text sets no time and no interval.
# custom:
#   cite: Control of Noise at Work Regulations reg 10(1)
#   subject: worker
#   topic: training
#   severity: major
#   evidence: [training, measurement]
#   remedy: Inform, instruct and train the worker, and record the day and the topics.
package duty.training

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": sprintf("the latest training is of %s", [input.training.date]),
	"because": [input.training.ref],
} if {
	exposed
	input.training != null
}

obligations contains {
	"holds": false,
	"note": "exposure is at or above a lower exposure action value, and no training is on record",
} if {
	exposed
	input.training == null
}

not_owed contains "exposure is not known to be at or above a lower exposure action value" if not exposed

exposed if common.any_current(input.exposed.lower)
