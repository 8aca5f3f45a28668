# METADATA
# title: Protectors worn
# description: >-
#   Where exposure reaches or exceeds one of the upper action values, the employer makes sure that workers use their
#   protectors as intended.
# custom:
#   cite: LärmVibrationsArbSchV § 8(3)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [wear_check, measurement]
#   remedy: Make sure that the worker wears protectors, and record a check of it.
package duty.protectors_worn

import data.common
import rego.v2

obligations contains {
	"key": "now",
	"holds": worn,
	"note": said,
	"missing": [words | worn == null; words := "a check since then that says whether the worker wears protectors"],
	"because": common.refs([check | some check in [input.wear]; counts]),
	"facts": {"compulsory_since": since},
} if {
	since != null
	something_to_wear
}

not_owed contains "the records do not show exposure at or above the upper action values now" if since == null

not_owed contains "no protector at hand, which is a finding of its own" if {
	since != null
	not something_to_wear
}

something_to_wear if input.protection != null

something_to_wear if worn != null

since := common.current_since(input.exposed.upper_reached)

# A check from before the exposure began says nothing of it.
counts if {
	input.wear != null
	input.wear.date >= since
}

worn := input.wear.worn if {
	counts
} else := null

said := "the worker was seen without protectors" if {
	worn == false
} else := "no check since then shows that the worker wears protectors" if {
	worn == null
} else := null
