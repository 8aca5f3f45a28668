# METADATA
# title: Peaks assessed
# description: >-
#   The risk assessment includes any exposure to peak sound pressure. Unless it is on record that the noise of a
#   noisy group holds no impulses, a C-weighted peak is on record.
# custom:
#   cite: Control of Noise at Work Regulations reg 5(3)(a)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [group, measurement]
#   remedy: Measure the C-weighted peak, or record that the noise holds no impulses.
package duty.peak_assessed

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "a C-weighted peak is on record",
	"because": [measured[count(measured) - 1].ref],
	"facts": {"workers": input.workers},
} if {
	count(measured) > 0
}

obligations contains {
	"holds": false,
	"note": "the noise holds impulses, but no C-weighted peak is on record for the group as it is now",
	"facts": {"workers": input.workers},
} if {
	noisy
	input.impulsive == true
	count(measured) == 0
}

obligations contains {
	"holds": null,
	"note": "it is not known whether the noise holds impulses, and no C-weighted peak is on record for the group as it is now",
	"missing": ["a C-weighted peak level, or that the noise holds no impulses"],
	"facts": {"workers": input.workers},
} if {
	noisy
	input.impulsive == null
	count(measured) == 0
}

not_owed contains "nothing suggests noise at a lower exposure action value, or the noise holds no impulses" if {
	not concerned
	count(measured) == 0
}

concerned if {
	input.impulsive != false
	noisy
}

# Peaks that describe the group as it is: a peak from before a change, after which the group was measured again, does not.
measured := [m | some m in input.measurements; m.peak_dbc != null; m.current == true]

noisy if input.suspected_noisy == true

noisy if common.any_current(input.exposed.lower)
