# METADATA
# title: Protectors provided
# description: >-
#   Where the lower action values are exceeded in spite of the measures, the employer provides suitable personal
#   hearing protectors.
# custom:
#   cite: LärmVibrationsArbSchV § 8(1)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [protector_issue, measurement]
#   remedy: Give the worker suitable protectors and record the issue.
package duty.protectors_available

import data.common
import rego.v2

obligations contains {
	"key": "now",
	"holds": input.protection != null,
	"note": said,
	"because": common.refs([input.protection]),
	"facts": {"above_since": common.current_since(input.exposed.lower_exceeded)},
} if {
	above_now
}

not_owed contains "the records do not show exposure above the lower action values now" if not above_now

above_now if common.any_current(input.exposed.lower_exceeded)

said := "exposure is above the lower action values, and no protector is on record as handed over and at hand" if {
	input.protection == null
} else := null
