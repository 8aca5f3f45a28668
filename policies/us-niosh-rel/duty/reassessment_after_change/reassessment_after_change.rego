# METADATA
# title: Reassessment after a change (recommended)
# description: >-
#   Where workers are at or above the REL, exposure is assessed again within three months of a change of equipment,
#   process or work that may alter it. A change that is known not to raise exposure is not asked about.
# custom:
#   cite: NIOSH 98-126, 1.3.2 (from memory)
#   subject: group
#   topic: monitoring
#   severity: minor
#   evidence: [change, measurement]
#   remedy: >-
#     Measure the exposure as it is since the change, or record that the change does not raise it.
package duty.reassessment_after_change

import rego.v2

obligations contains {
	"key": change.id,
	"after": change.date,
	"within": "reassessment_time",
	"by": change.measured,
	"note": sprintf("the change %s of %s may raise exposure, so it is to be assessed again", [change.id, change.date]),
	"because": [change.ref],
	"facts": {"change": change.what, "workers": input.workers},
} if {
	some change in changes
	known(change)
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
	some change in changes
	not known(change)
}

not_owed contains "no change that may raise exposure, while at or above the REL" if count(changes) == 0

changes := [change | some change in input.changes; change.enrolling; change.raises_exposure != "no"]

known(change) if change.raises_exposure == "yes"

known(change) if change.measured != null
