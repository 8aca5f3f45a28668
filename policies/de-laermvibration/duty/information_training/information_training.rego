# METADATA
# title: Instruction before the work begins
# description: >-
#   Where exposure may reach or exceed the lower action values, workers are instructed (Unterweisung) on the results
#   of the assessment and the risks to health before they begin the work.
# custom:
#   cite: LärmVibrationsArbSchV § 11(1)
#   subject: worker
#   topic: training
#   severity: major
#   evidence: [training, measurement]
#   remedy: Instruct the worker now, and the next one before the work begins.
package duty.information_training

import rego.v2

obligations contains {
	"key": stretch.from,
	"before": stretch.from,
	"by": "training.any",
	"note": sprintf("exposure at or above the lower action values began on %s", [stretch.from]),
	"because": [exposure.ref | some exposure in input.exposures; exposure.from == stretch.from; exposure.ref != null],
} if {
	some stretch in current
}

not_owed contains "the records do not show exposure at or above the lower action values now" if count(current) == 0

current := [stretch | some stretch in input.exposed.lower_reached; stretch.current == true]
