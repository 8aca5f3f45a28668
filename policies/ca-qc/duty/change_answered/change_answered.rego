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

known(change) if change.raises_exposure == "yes"

known(change) if change.identified_on != null

first_answer(change) := {"date": answers[0][0], "ref": answers[0][1]} if {
	answers := sort(array.concat(
		[[m.date, m.ref] | some m in input.measurements; m.date >= change.date],
		[[day, control.ref] |
			some control in input.controls
			some day in [control.started_on, control.installed_on]
			day != null
			day >= change.date
		],
	))
	count(answers) > 0
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
