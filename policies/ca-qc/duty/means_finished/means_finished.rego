# METADATA
# title: Means in place before the next evaluation
# description: >-
#   The reasonable means that an evaluation found are fully implemented before the start of the next evaluation, that
#   is before its five years are over, or before it was made if that was earlier. A means that was not begun while the
#   limits are kept is asked about where its beginning is.
# custom:
#   cite: r. 13, s. 133
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [document, control]
#   remedy: Complete the means, and record the day on which it was put in place.
package duty.means_finished

import data.common
import rego.v2

obligations contains {
	"key": sprintf("%s/%s", [control.date, control.what]),
	"before": evaluation.ends,
	"by": in_place(control),
	"note": sprintf("%s, found after the evaluation of %s", [control.what, evaluation.date]),
	"because": [control.ref, evaluation.ref],
	"facts": {"period_ends": evaluation.ends},
} if {
	some control in found
	evaluation := evaluation_of(control)
}

not_owed contains "no means that an evaluation of this section found is to be completed, for a situation above a limit" if {
	every control in found {
		not evaluation_of(control)
	}
}

found := [control |
	count(input.exposed.limit) > 0
	some control in input.controls
	control.feasible == "yes"
	not left_open(control)
]

left_open(control) if {
	control.started_on == null
	control.installed_on == null
	within_now
}

# The situation was above a limit and is within the limits now.
within_now if {
	every spell in input.exposed.limit {
		spell.current == false
	}
	every stretch in input.exposure_unknown.limit {
		not common.covers(stretch, input.as_of)
	}
}

in_place(control) := {"date": control.installed_on, "ref": control.ref} if {
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
