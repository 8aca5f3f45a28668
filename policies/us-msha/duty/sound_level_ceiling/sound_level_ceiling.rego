# METADATA
# title: Ceiling of sound levels
# description: >-
#   No miner is exposed at any time to sound levels above 115 dBA, determined without adjustment for hearing protectors.
# custom:
#   cite: 30 CFR 62.130(c)
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement]
#   remedy: Stop work in sound levels above 115 dBA until the source is controlled, and measure again.
package duty.sound_level_ceiling

import data.common
import rego.v2

obligations contains {
	"key": measurement.id,
	"value": measurement.max_dba,
	"at_most": "sound_level_ceiling",
	"on": measurement.date,
	"note": said(measurement),
	"missing": common.missing(measurement.max_dba, "the highest continuous level"),
	"because": [measurement.ref],
	"facts": {"workers": input.workers},
} if {
	some measurement in noisy
}

obligations contains {
	"value": null,
	"at_most": "sound_level_ceiling",
	"note": "a highest continuous level is on record from before a change or control, and none since",
	"missing": ["the highest continuous level as it is now"],
	"because": common.refs(measured_before),
	"facts": {"workers": input.workers},
} if {
	count(noisy) == 0
	count(measured_before) > 0
}

not_owed contains "no highest level on record, and no measurement at the action level" if {
	count(noisy) == 0
	count(measured_before) == 0
}

said(measurement) := sprintf("the measurement of %s reaches the action level and does not give its highest continuous level", [measurement.date]) if {
	measurement.max_dba == null
} else := sprintf("highest continuous level measured on %s", [measurement.date])

noisy := [measurement | some measurement in input.measurements; may_matter(measurement)]

# A level from before a change or control, after which the group was measured again, tells nothing of the group now.
measured_before := [measurement | some measurement in input.measurements; not measurement.current; measurement.max_dba != null]

may_matter(measurement) if {
	measurement.current
	measurement.max_dba != null
}

may_matter(measurement) if {
	measurement.current
	measurement.reaches_enrolling == true
}
