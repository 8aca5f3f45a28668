# METADATA
# title: Monitoring repeated after a change
# description: >-
#   Monitoring is repeated whenever a change in production, process, equipment or controls raises exposure so that more
#   employees may be at or above the action level, or the protectors in use may no longer be adequate. The paragraph sets
#   neither a time nor a fixed period.
# custom:
#   cite: 29 CFR 1910.95(d)(3)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [change, measurement]
#   remedy: Measure the group's exposure as it is since the change, or record that the change does not raise it.
package duty.monitoring_repeated

import rego.v2

obligations contains {
	"key": change.id,
	"after": change.date,
	"by": change.measured,
	"note": sprintf("the change %s of %s raises exposure, so it is to be measured again", [change.id, change.date]),
	"because": [change.ref],
	"facts": {"change": change.what, "workers": input.workers},
} if {
	some change in input.changes
	change.raises_exposure == "yes"
}

obligations contains {
	"key": change.id,
	"holds": true,
	"on": change.date,
	"note": sprintf("measured on %s, since the change %s of %s", [change.measured.date, change.id, change.date]),
	"because": [change.ref, change.measured.ref],
	"facts": {"change": change.what, "workers": input.workers},
} if {
	some change in changes_of_unknown_effect
	change.measured != null
}

obligations contains {
	"key": change.id,
	"holds": null,
	"on": change.date,
	"note": sprintf("nothing was measured since the change %s of %s, whose effect on exposure is not known", [change.id, change.date]),
	"missing": ["whether the change raises exposure"],
	"because": [change.ref],
	"facts": {"change": change.what, "workers": input.workers},
} if {
	some change in changes_of_unknown_effect
	change.measured == null
}

not_owed contains "no change that may raise exposure" if {
	every change in input.changes { change.raises_exposure == "no" }
}

changes_of_unknown_effect := [change | some change in input.changes; not change.raises_exposure in ["yes", "no"]]
