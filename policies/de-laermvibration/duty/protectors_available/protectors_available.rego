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
	"facts": {"above_since": min({stretch.from | some stretch in above_now})},
} if {
	count(above_now) > 0
}

not_owed contains "the records do not show exposure above the lower action values now" if count(above_now) == 0

above_now := [stretch | some stretch in input.exposed.lower_exceeded; stretch.current == true]

said := "exposure is above the lower action values, and no protector is on record as handed over and at hand" if {
	input.protection == null
} else := null
