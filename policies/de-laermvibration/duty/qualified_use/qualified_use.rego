# METADATA
# title: Qualified use from 110 dB(A) (guidance)
# description: >-
#   From a daily level of 110 dB(A) protectors are used in the qualified way, with instruction and exercises several
#   times a year.
# custom:
#   cite: TRLV Lärm 3
#   subject: worker
#   topic: training
#   severity: minor
#   evidence: [training, measurement]
#   remedy: Train the worker with exercises in the use of protectors, and record it.
package duty.qualified_use

import rego.v2

obligations contains {
	"key": stretch.from,
	"every": "qualified_use_interval",
	"during": {"from": max([stretch.from, known_from]), "to": stretch.to},
	"by": "training.protectors",
	"note": "at this level protectors are used with exercises several times a year",
} if {
	some stretch in current
}

not_owed contains "the records do not show a level now that asks for qualified use" if count(current) == 0

current := [stretch | some stretch in input.exposed.qualified_use; stretch.current == true]

# Before the rule was published nothing is counted.
known_from := data.parameters.qualified_use_interval.values[0].from
