# METADATA
# title: Protectors worn
# description: >-
#   The employer sees to it that workers above the level of protectors wear them. From memory.
# custom:
#   cite: OHS Code, s. 222
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [wear_check, measurement]
#   remedy: See to it that the worker wears protectors, and record a check of it.
package duty.protectors_worn

import data.common
import rego.v2

obligations contains {
	"key": "now",
	"holds": worn,
	"on": checked_on,
	"note": said[worn],
	"missing": common.missing(worn, "a check of whether protectors are worn"),
	"because": common.refs([input.wear]),
	"facts": {"exposed_since": since},
} if {
	above
}

not_owed contains "the worker is not known to be above the level of protectors now" if not above

since := common.current_since(input.exposed.protectors)

default worn := null

worn := input.wear.worn if input.wear.date >= since

checked_on := input.wear.date if {
	input.wear != null
} else := null

said := {
	true: null,
	false: "the worker was seen without protectors",
	null: "no check since protectors are to be worn says whether the worker wears them",
}

above if since != null
