# METADATA
# title: Change identified within 30 days
# description: >-
#   When a workplace situation is changed so that there is a risk of exceeding a limit, the employer identifies this
#   within 30 days of the change.
# custom:
#   cite: r. 13, s. 134, first paragraph
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [change]
#   remedy: Enter the change in the register as one that brings a risk of exceeding the limits, with the date.
package duty.change_identified

import data.common
import rego.v2

obligations contains {
	"key": change.id,
	"after": change.date,
	"within": "change_identification_time",
	"by": entry(change),
	"note": change.what,
	"because": [change.ref],
} if {
	some change in concerned
	known(change)
}

obligations contains {
	"key": change.id,
	"holds": null,
	"note": sprintf("nobody has said whether the change of %s raises exposure", [change.date]),
	"missing": ["whether the change raises exposure"],
	"because": [change.ref],
} if {
	some change in concerned
	not known(change)
}

not_owed contains "no change that brings a risk of exceeding a limit is on record" if count(concerned) == 0

known(change) if change.raises_exposure == "yes"

known(change) if change.identified_on != null

entry(change) := {"date": change.identified_on, "ref": change.ref} if {
	change.identified_on != null
} else := null

# A change of a situation that may come to exceed a limit, since the section came into force.
concerned := [change |
	some change in input.changes
	change.raises_exposure != "no"
	common.at(data.parameters.sections_in_force, change.date) != null
	at_risk(change)
]

at_risk(change) if change.enrolling

at_risk(_) if input.suspected_noisy != false
