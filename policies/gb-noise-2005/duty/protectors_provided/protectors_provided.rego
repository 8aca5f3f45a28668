# METADATA
# title: Protectors provided
# description: >-
#   Where exposure cannot be brought below the upper exposure action values by other means, hearing protectors are
#   provided to every employee who is so exposed.
# custom:
#   cite: Control of Noise at Work Regulations reg 7(2)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [protector_issue, measurement]
#   remedy: Give the worker suitable protectors, free of charge, and record the issue.
package duty.protectors_provided

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "a protector is at hand",
	"because": [input.protection.ref],
} if {
	not exempted
	at_upper
	input.protection != null
}

obligations contains {
	"holds": false,
	"note": "exposure is at or above an upper exposure action value, and no protector is at hand",
	"because": [exposure.ref | some exposure in input.exposures; common.covers(exposure, input.as_of); exposure.ref != null],
} if {
	not exempted
	at_upper
	input.protection == null
}

obligations contains {
	"holds": null,
	"note": sprintf("no protector is at hand, and it is not known whether exposure is at or above an upper exposure action value: %s", [concat("; ", not_known)]),
	"missing": ["an exposure that can be held against the upper exposure action values"],
} if {
	not exempted
	not at_upper
	count(not_known) > 0
	input.protection == null
}

obligations contains {
	"lifted": "a certificate exempts the site from providing protectors",
	"cite": exemption_cite[input.choices.exemption],
	"on": input.as_of,
} if {
	exempted
	at_upper
}

not_owed contains "exposure is not known to be at or above an upper exposure action value" if {
	not at_upper
	count(not_known) == 0
}

not_owed contains "a protector is at hand, or none need be" if {
	not at_upper
	count(not_known) > 0
	need_not_be
}

need_not_be if exempted

need_not_be if input.protection != null

at_upper if common.any_current(input.exposed.upper)

# Of a worker who is not known to be at or above a lower action value, exposure-assessed tells.
not_known := [stretch.reason |
	common.any_current(input.exposed.lower)
	some stretch in input.exposure_unknown.upper
	common.covers(stretch, input.as_of)
]

exempted if input.choices.exemption in object.keys(exemption_cite)

exemption_cite := {
	"overall_risk": "Control of Noise at Work Regulations reg 11",
	"emergency_services": "Control of Noise at Work Regulations reg 12",
	"defence": "Control of Noise at Work Regulations reg 13",
}
