# METADATA
# title: Action after a threshold shift
# description: >-
#   Within 30 calendar days of receiving evidence or confirmation of a standard threshold shift, unless a physician or
#   audiologist determines that it is neither work-related nor aggravated by occupational noise, the operator retrains
#   the miner, with the instruction of 62.180; lets the miner choose a hearing protector, or a different one; and reviews
#   the effectiveness of the engineering and administrative controls and corrects their deficiencies.
# custom:
#   cite: 30 CFR 62.174(a)-(c)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, training, audiogram]
#   remedy: >-
#     Retrain the miner, offer the choice of a protector, review the controls, and record each; or obtain the opinion of a
#     physician or audiologist on whether noise at work caused or aggravated the shift.
package duty.shift_actions

import data.common
import rego.v2

obligations contains {
	"key": shift.id,
	"lifted": "a physician or audiologist found that the shift is neither work-related nor aggravated by noise at work",
	"cite": "30 CFR 62.174",
	"health": shift.hearing,
	"because": common.refs([shift, shift.not_work_related]),
} if {
	some shift in shifts
	shift.not_work_related != null
}

obligations contains {
	"key": sprintf("%s/%s", [shift.id, action.name]),
	"after": received(shift),
	"within": "shift_action_time",
	"by": action.done,
	"during": in_program(shift.date),
	"note": sprintf("after the shift of %s %s", [shift.date, action.what]),
	"missing": common.missing(received(shift), "the day on which the result was received"),
	"facts": {"ears": shift.ears, "age_corrected": shift.age_corrected},
	"health": shift.hearing,
	"because": common.refs([shift, shift.other_opinion]),
} if {
	some shift in shifts
	shift.not_work_related == null
	some action in actions(shift)
}

# A test that became the new baseline after a long absence is compared with no other.
shifts := [shift | some shift in input.shifts; not shift.ref in set_anew]

set_anew := {revision.audiogram | some revision in input.revisions; revision.result == "new_baseline"}

actions(shift) := [
	{"name": "retraining", "what": "the miner is to be retrained", "done": shift.retraining},
	{"name": "choice", "what": "the miner is to choose a protector, or a different one", "done": first(shift, "protector_choice")},
	{"name": "controls", "what": "the controls are to be reviewed and deficiencies corrected", "done": first(shift, "controls_reviewed")},
]

# The test that shows the shift, and the first test, where a retest stands in for it.
tests(shift) := [test | some test in input.audiograms; test.ref in {shift.ref, shift.first_test.ref}]

received(shift) := test.received_on if {
	some test in input.audiograms
	test.ref == shift.ref
} else := null

first(shift, kind) := {"date": found[0].date, "ref": found[0].ref} if {
	found := [done | some test in tests(shift); some done in test.follow_ups; done.kind == kind]
	count(found) > 0
} else := null

in_program(day) := {"from": stretches[0].from, "to": stretches[0].to} if {
	stretches := [stretch | some stretch in input.enrolled; common.covers(stretch, day)]
	count(stretches) > 0
} else := null

not_owed contains "no audiogram made while in the program shows a shift" if count(shifts) == 0
