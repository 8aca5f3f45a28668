# METADATA
# title: Noise areas are known
# description: >-
#   Areas in which an upper action value may be exceeded are noise areas (Lärmbereiche). For that it must be on record
#   where the group works.
# custom:
#   cite: LärmVibrationsArbSchV § 7(4)
#   subject: group
#   topic: controls
#   severity: minor
#   evidence: [group]
#   remedy: Record the area where the group works.
package duty.area_named

import data.common
import rego.v2

obligations contains {
	"holds": input.area != null,
	"note": said,
	"because": [sprintf("group/%s", [input.id])],
	"facts": {"area": input.area, "workers": input.workers},
} if {
	upper_exceeded_now
}

not_owed contains "the records do not show exposure above the upper action values now" if not upper_exceeded_now

upper_exceeded_now if common.any_current(input.exposed.upper_exceeded)

said := "no record says where the group works, so that nobody can tell which workplace is to be marked" if {
	input.area == null
} else := null
