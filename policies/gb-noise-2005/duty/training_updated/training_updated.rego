# METADATA
# title: Training updated after a change
# description: >-
#   The information, instruction and training are updated to take account of significant changes in the type of work
#   or the working methods. A change that is recorded as raising exposure is taken to be significant; what was given
#   to the group after it is proven by a record of instruction.
# custom:
#   cite: Control of Noise at Work Regulations reg 10(3)
#   subject: group
#   topic: training
#   severity: minor
#   evidence: [change, document]
#   remedy: Instruct the group on the change, and record it.
package duty.training_updated

import data.common
import rego.v2

obligations contains {
	"key": change.id,
	"after": change.date,
	"by": "document.instruction",
	"note": sprintf("the change %s of %s raises exposure, so the group is to be instructed again", [change.id, change.date]),
	"because": [change.ref],
	"facts": {"change": change.what, "workers": input.workers},
} if {
	exposed
	some change in input.changes
	change.raises_exposure == "yes"
}

not_owed contains "no change that raises exposure, or the group is not known to be at or above a lower exposure action value" if {
	not changed
}

changed if {
	exposed
	some change in input.changes
	change.raises_exposure == "yes"
}

exposed if common.any_current(input.exposed.lower)
