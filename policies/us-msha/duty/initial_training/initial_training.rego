# METADATA
# title: First training
# description: The operator trains the miner within 30 days of enrolment in the hearing conservation program.
# custom:
#   cite: 30 CFR 62.180(a)
#   subject: worker
#   topic: training
#   severity: major
#   evidence: [training]
#   remedy: Train the miner now, certify the training, and record it.
package duty.initial_training

import rego.v2

obligations contains {
	"key": stretch.from,
	"after": stretch.from,
	"within": "training_first",
	"by": "training.any",
	"during": {"from": stretch.from, "to": stretch.to},
	"note": sprintf("exposure at or above the action level began on %s", [stretch.from]),
} if {
	some stretch in input.enrolled
}

not_owed contains "no stretch at or above the action level is known" if count(input.enrolled) == 0
