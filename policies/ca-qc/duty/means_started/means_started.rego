# METADATA
# title: Means begun within the year
# description: >-
#   In the year following the evaluation the employer begins to implement all reasonable means at the source that it
#   found and, if these are not enough, other means to meet the limits. Where the limits are kept by now, whether a
#   means that was not begun is one at the source is a judgement.
# custom:
#   cite: r. 13, s. 133
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [document, control]
#   remedy: Begin the means now, and record the day on which the work on it began.
package duty.means_started

import data.common
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
	not left_open(control)
}

obligations contains {
	"key": sprintf("%s/%s", [control.date, control.what]),
	"ask": "The limits are kept now. Is this a means at the source, which is to be begun all the same?",
	"of": "competent person (engineering)",
	"by": null,
	"note": sprintf("%s: %s", [control.what, start.note]),
	"because": start.refs,
} if {
	some control in found
	start := start_of(control)
	left_open(control)
}

not_owed contains "no means was found reasonable by an evaluation of this section, for a situation above a limit" if {
	every control in found {
		not start_of(control)
	}
}

found := [control |
	count(input.exposed.limit) > 0
	some control in input.controls
	control.feasible == "yes"
]

left_open(control) if {
	begun(control) == null
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
