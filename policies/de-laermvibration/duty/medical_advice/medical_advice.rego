# METADATA
# title: General advice by occupational medicine
# description: >-
#   Above the lower action values workers receive general advice by occupational medicine (allgemeine
#   arbeitsmedizinische Beratung). It may be part of the instruction.
# custom:
#   cite: LärmVibrationsArbSchV § 11(3)
#   subject: worker
#   topic: information
#   severity: minor
#   evidence: [training]
#   remedy: Add the advice to the instruction, with the physician if that is needed, and record it.
package duty.medical_advice

import data.common
import rego.v2

obligations contains {
	"key": "now",
	"holds": advised,
	"note": said,
	"missing": [words | advised == null; words := "the topics of the instruction"],
	"because": common.refs([input.training]),
} if {
	exceeded_now
}

not_owed contains "the records do not show exposure above the lower action values now" if not exceeded_now

exceeded_now if common.any_current(input.exposed.lower_exceeded)

# The advice may be part of the instruction.
advised := false if {
	input.training == null
} else := null if {
	input.training.topics_unrecorded == true
} else := "medical_advice" in input.training.topics

said := "no general advice by occupational medicine is on record" if {
	advised == false
} else := null
