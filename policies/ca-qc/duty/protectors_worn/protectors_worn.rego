# METADATA
# title: Protectors worn
# description: >-
#   The employer sees to it that the protectors are worn where a limit is exceeded. From a secondary source.
# custom:
#   cite: r. 13, s. 136
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
	something_to_wear
}

not_owed contains "the worker is not known to be above a limit now" if not above

not_owed contains "no protector is at hand, which is a finding of its own" if {
	above
	not something_to_wear
}

something_to_wear if input.protection != null

something_to_wear if worn != null

since := common.current_since(input.exposed.limit)

default worn := null

worn := input.wear.worn if input.wear.date >= since

checked_on := input.wear.date if {
	input.wear != null
} else := null

said := {
	true: null,
	false: "the worker was seen without protectors",
	null: "no check since the limit is exceeded says whether the worker wears protectors",
}

above if since != null
