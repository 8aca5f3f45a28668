# METADATA
# title: Repeated training
# description: >-
#   After the first training the miner is trained every 12 months, for as long as exposure equals or exceeds the action
#   level.
# custom:
#   cite: 30 CFR 62.180(a)
#   subject: worker
#   topic: training
#   severity: major
#   evidence: [training]
#   remedy: Train the miner now, certify the training, and record it.
package duty.repeated_training

import rego.v2

obligations contains {"every": "training_interval", "during": stretch, "by": "training.any"} if {
	some enrolled in input.enrolled
	stretch := {"from": enrolled.from, "to": enrolled.to}
}

not_owed contains "no stretch at or above the action level is known" if count(input.enrolled) == 0
