# METADATA
# title: Means begun within the year
# description: >-
#   In the year following the evaluation the employer begins to implement all reasonable means at the source that it
#   found and, if these are not enough, other means to meet the limits.
# custom:
#   cite: r. 13, s. 133
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [document, control]
#   remedy: Begin the means now, and record the day on which the work on it began.
package duty.means_started

import rego.v2

obligations contains {
	"key": sprintf("%s/%s", [control.date, control.what]),
	"after": start.date,
	"within": "means_start_time",
	"by": begun(control),
	"note": sprintf("%s: %s", [control.what, start.note]),
	"because": start.refs,
} if {
	some control in found
	start := start_of(control)
}

not_owed contains "no means was found reasonable by an evaluation of this section" if {
	every control in found {
		not start_of(control)
	}
}

found := [control | some control in input.controls; control.feasible == "yes"]

commencement := min([period.from | some period in data.parameters.sections_in_force.values])

# What a change brings is the matter of section 134. A means that follows from neither counts from its own day.
start_of(control) := {
	"date": max([evaluation.date, commencement]),
	"note": sprintf("found after the evaluation of %s", [evaluation.date]),
	"refs": [control.ref, evaluation.ref],
} if {
	evaluation := evaluation_of(control)
} else := {
	"date": control.date,
	"note": "found reasonable without an evaluation on record",
	"refs": [control.ref],
} if {
	control.date >= commencement
	not after_evaluation(control)
	not after_change(control)
}

after_evaluation(control) if {
	some evaluation in counted
	evaluation.date <= control.date
}

after_change(control) if {
	some change in input.changes
	change.raises_exposure != "no"
	change.date >= commencement
	change.date <= control.date
}

begun(control) := {"date": control.started_on, "ref": control.ref} if {
	control.started_on != null
} else := {"date": control.installed_on, "ref": control.ref} if {
	control.installed_on != null
} else := null

# The evaluation that a means follows from: the latest on or before its day, unless a change came in between.
evaluation_of(control) := evaluation if {
	some i, evaluation in counted
	evaluation.date <= control.date
	every later in array.slice(counted, i + 1, count(counted)) {
		later.date > control.date
	}
	every change in input.changes {
		not comes_between(change, evaluation, control)
	}
}

comes_between(change, evaluation, control) if {
	change.raises_exposure != "no"
	change.date > evaluation.date
	change.date <= control.date
}

counted := [evaluation | some evaluation in input.evaluations; counts(evaluation)]

counts(evaluation) if evaluation.early == false

counts(evaluation) if {
	evaluation.early
	input.choices.early_evaluation == "counted"
}
