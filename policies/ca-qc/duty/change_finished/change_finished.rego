# METADATA
# title: Means of a change completed
# description: >-
#   A means chosen after a change is complete before the end of the five-year period of the last evaluation. Where
#   that period ends less than two years after the change, it is complete within two years of the change.
# custom:
#   cite: r. 13, s. 134, third paragraph
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [change, control, document]
#   remedy: Complete the means, and record the day on which it was put in place.
package duty.change_finished

import data.common
import rego.v2

obligations contains object.union(deadline(change), {
	"key": sprintf("%s/%s", [change.id, control.what]),
	"by": in_place(control),
	"because": [change.ref, control.ref],
	"note": control.what,
	"facts": {"changed_on": change.date, "period_ends": change.period_ends},
}) if {
	some change in concerned
	some control in means_of(change)
	in_period(change)
}

obligations contains {
	"key": sprintf("%s/%s", [change.id, control.what]),
	"holds": null,
	"because": [change.ref, control.ref],
	"note": sprintf("no evaluation on record gives the five-year period in which the change of %s fell", [change.date]),
	"missing": ["the evaluation before the change"],
} if {
	some change in concerned
	some control in means_of(change)
	not in_period(change)
}

not_owed contains "no means was chosen after a change that brings a risk of exceeding a limit" if {
	every change in concerned {
		count(means_of(change)) == 0
	}
}

deadline(change) := {"after": change.date, "within": "change_finish_time"} if change.period_short == true

deadline(change) := {"before": change.period_ends} if change.period_short == false

in_period(change) if {
	change.period_short != null
	some evaluation in input.evaluations
	evaluation.date <= change.date
	counts(evaluation)
}

counts(evaluation) if evaluation.early == false

counts(_) if input.choices.early_evaluation == "counted"

means_of(change) := [control |
	some control in input.controls
	control.feasible == "yes"
	control.date >= change.date
	not taken_over(change, control)
]

# An evaluation or another change between the two takes the means over.
taken_over(change, control) if {
	some evaluation in input.evaluations
	evaluation.date >= change.date
	evaluation.date <= control.date
}

taken_over(change, control) if {
	some other in concerned
	other.date > change.date
	other.date <= control.date
}

in_place(control) := {"date": control.installed_on, "ref": control.ref} if {
	control.installed_on != null
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
