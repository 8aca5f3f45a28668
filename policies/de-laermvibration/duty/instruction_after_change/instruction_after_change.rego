# METADATA
# title: Instruction after a material change
# description: >-
#   Workers are instructed whenever the work that exposes them changes materially. Single sessions stand in the
#   records of workers; that a group was instructed after a change is shown by a document.
# custom:
#   cite: LärmVibrationsArbSchV § 11(1) sentence 2
#   subject: group
#   topic: training
#   severity: major
#   evidence: [document, change]
#   remedy: Instruct the group on the change, and record it.
package duty.instruction_after_change

import data.common
import rego.v2

# The law sets no time.
obligations contains {
	"key": change.id,
	"after": change.date,
	"by": "document.instruction",
	"note": sprintf("on %s the work in noise may have changed materially: %s", [change.date, about(change)]),
	"because": [change.ref],
} if {
	lower_reached_now
	some change in material
	matters(change)
}

# Whether the change is material, nobody can tell before somebody has said what it does.
obligations contains {
	"key": change.id,
	"holds": null,
	"note": sprintf("nobody has said whether the change of %s raises exposure: %s", [change.date, about(change)]),
	"missing": ["whether the change raises exposure, or an instruction of the group since"],
	"because": [change.ref],
} if {
	lower_reached_now
	some change in material
	not matters(change)
}

not_owed contains "the records do not show exposure at or above the lower action values now" if not lower_reached_now

not_owed contains "no change that may matter to the instruction is on record" if {
	lower_reached_now
	count(material) == 0
}

lower_reached_now if common.any_current(input.exposed.lower_reached)

material := [change | some change in input.changes; change.raises_exposure != "no"]

matters(change) if change.raises_exposure == "yes"

matters(change) if {
	some paper in input.documents
	paper.kind == "instruction"
	paper.date >= change.date
}

about(change) := change.what if {
	change.what != null
} else := "what was changed is not recorded"
