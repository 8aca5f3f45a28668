# METADATA
# title: Change measured or answered within a year
# description: >-
#   Within the year following a change that brings a risk of exceeding a limit, the employer measures the daily level
#   and the peak, or begins to implement a reasonable means.
# custom:
#   cite: r. 13, s. 134, second paragraph
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [change, measurement, control]
#   remedy: Measure the daily level and the peak of the situation, or begin a reasonable means, and record it.
package duty.change_answered

import data.common
import rego.v2

obligations contains {
	"key": change.id,
	"after": change.date,
	"within": "change_answer_time",
	"by": first_answer(change),
	"note": change.what,
	"because": [change.ref],
} if {
	some change in concerned
	known(change)
}

not_owed contains "no change that is known to bring a risk of exceeding a limit is on record" if {
	every change in concerned {
		not known(change)
	}
}

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

first_answer(change) := {"date": answers[0][0], "ref": answers[0][1]} if {
	answers := sort(array.concat(
		[[m.date, m.ref] | some m in input.measurements; m.date >= change.date],
		[[begun(control), control.ref] | some control in input.controls; begun(control) >= change.date],
	))
	count(answers) > 0
} else := null

# The day on which the work began or, where that is not recorded, on which the means was put in place.
begun(control) := control.started_on if {
	control.started_on != null
} else := control.installed_on if {
	control.installed_on != null
}

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
