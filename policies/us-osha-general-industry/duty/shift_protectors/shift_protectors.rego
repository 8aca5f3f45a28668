# METADATA
# title: Protectors fitted and use trained after a shift
# description: >-
#   Unless a physician determines that the standard threshold shift is not work related or aggravated by occupational
#   noise exposure, the employer ensures that an employee not using hearing protectors is fitted with them, trained in
#   their use and care and required to use them, and that an employee already using them is refitted and retrained and
#   provided with protectors of greater attenuation if necessary. The opinion of anybody but a physician lifts nothing.
# custom:
#   cite: 29 CFR 1910.95(g)(8)(ii)(A)-(B)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, fit_test, protector_issue, training]
#   remedy: >-
#     Fit or refit the worker with protectors and train or retrain the worker in their use and care, or obtain a
#     physician's opinion on whether noise at work caused or aggravated the shift.
package duty.shift_protectors

import data.common
import rego.v2

obligations contains {
	"key": shift.id,
	"lifted": "a physician found that noise at work neither caused nor aggravated the shift",
	"cite": "29 CFR 1910.95(g)(8)(ii)",
	"health": shift.hearing,
	"because": [shift.ref, shift.not_work_related.ref],
} if {
	some shift in input.shifts
	shift.not_work_related != null
}

obligations contains {
	"key": sprintf("%s/%s", [shift.id, step.name]),
	"after": shift.date,
	"by": step.done,
	"note": asked(step, shift),
	"facts": {"ears": shift.ears, "protector_at_hand": shift.had_protector},
	"health": shift.hearing,
	"because": common.refs([shift, step.done, shift.other_opinion]),
} if {
	some shift in input.shifts
	some step in owed(shift)
}

# Both steps are owed while the worker is in the program; after that only what was done is shown.
owed(shift) := [step |
	shift.not_work_related == null
	some step in steps(shift)
	due_or_done(shift, step)
]

due_or_done(shift, _) if shift.still_enrolled

due_or_done(_, step) if step.done != null

steps(shift) := [
	{"name": "fitting", "what": "refitted with protectors", "done": shift.fitting},
	{"name": "training", "what": "retrained in their use and care", "done": shift.retraining},
] if {
	shift.had_protector
} else := [
	{"name": "fitting", "what": "fitted with protectors", "done": shift.fitting},
	{"name": "training", "what": "trained in their use and care", "done": shift.retraining},
]

asked(step, shift) := sprintf("after the shift of %s the worker is to be %s", [shift.date, step.what]) if {
	shift.other_opinion == null
} else := sprintf(
	"after the shift of %s the worker is to be %s; the opinion on record is not known to be a physician's",
	[shift.date, step.what],
)

not_owed contains "no audiogram made while in the program shows a shift" if count(input.shifts) == 0

not_owed contains "the worker is no longer in the program" if {
	count(input.shifts) > 0
	every shift in input.shifts { nothing_owed(shift) }
}

nothing_owed(shift) if {
	shift.not_work_related == null
	count(owed(shift)) == 0
}
