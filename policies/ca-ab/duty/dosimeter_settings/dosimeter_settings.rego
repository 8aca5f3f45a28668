# METADATA
# title: Settings of the dosimeter
# description: >-
#   A dosimeter is set at a criterion level of 85 dBA with a 3 dB exchange rate, a threshold of 75 dBA or lower, or
#   off, and slow response. A dose of another exchange rate tells nothing of the exposure; the threshold is looked at
#   here. Whether the response was slow is not a fact.
# custom:
#   cite: OHS Code, s. 219(2)(a)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [measurement]
#   remedy: Measure again with the threshold at 75 dBA or lower, or off.
package duty.dosimeter_settings

import data.common
import rego.v2

obligations contains {
	"key": m.id,
	"value": m.threshold_db,
	"at_most": "dosimeter_threshold",
	"on": m.date,
	"note": sprintf("threshold of the dose of %s", [m.date]),
	"missing": common.missing(m.threshold_db, "the threshold of the dose"),
	"because": [m.ref],
} if {
	some m in doses
}

not_owed contains "no dose of the group as it is was taken with a 3 dB exchange rate" if count(doses) == 0

doses := [m | some m in input.measurements; m.current; m.dosed]
