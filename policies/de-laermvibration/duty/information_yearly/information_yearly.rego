# METADATA
# title: Instruction repeated each year (guidance)
# description: >-
#   The instruction is repeated at regular intervals; a yearly repetition secures that it lasts.
# custom:
#   cite: TRLV Lärm 1 § 7(3); LärmVibrationsArbSchV § 11(1)
#   subject: worker
#   topic: training
#   severity: minor
#   evidence: [training]
#   remedy: Instruct the worker again, and record the day and the topics.
package duty.information_yearly

import rego.v2

obligations contains {
	"key": stretch.from,
	"every": "instruction_interval",
	"during": {"from": max([stretch.from, known_from]), "to": stretch.to},
	"by": "training.any",
	"note": "the instruction is repeated each year",
} if {
	input.training != null
	some stretch in current
}

not_owed contains "the records do not show exposure at or above the lower action values now" if count(current) == 0

not_owed contains "no instruction is on record, which is a finding of its own" if {
	count(current) > 0
	input.training == null
}

current := [stretch | some stretch in input.exposed.lower_reached; stretch.current == true]

# Before the rule was published nothing is counted.
known_from := data.parameters.instruction_interval.values[0].from
