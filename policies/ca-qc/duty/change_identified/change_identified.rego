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
	"note": sprintf("it is not known whether the change of %s brings a risk of exceeding a limit", [change.date]),
	"missing": [open_question(change)],
	"because": [change.ref],
} if {
	some change in concerned
	not known(change)
}

not_owed contains "no change that brings a risk of exceeding a limit is on record" if count(concerned) == 0

# It brings a risk of exceeding a limit: so the register says, or it raises the noise of a situation where that is near.
known(change) if change.identified_on != null

known(change) if {
	change.raises_exposure == "yes"
	change.enrolling
}

known(change) if {
	change.raises_exposure == "yes"
	input.suspected_noisy == true
}

open_question(change) := "whether noise is suspected in this situation" if {
	change.raises_exposure == "yes"
} else := "whether the change raises exposure"

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

at_risk(_) if input.suspected_noisy == true

at_risk(change) if {
	input.suspected_noisy == null
	not found_below(change)
}

# Measured since, and no limit exceeded.
found_below(change) if {
	change.measured != null
	every stretch in input.exposure_unknown.limit {
		not common.covers(stretch, change.measured.date)
	}
}
