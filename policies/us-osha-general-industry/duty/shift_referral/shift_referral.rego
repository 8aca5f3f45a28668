# METADATA
# title: Referral after a shift
# description: >-
#   Unless a physician determines that the standard threshold shift is not work related or aggravated by occupational
#   noise exposure, the employee is referred for a clinical audiological evaluation or an otological examination, as
#   appropriate, if additional testing is necessary or if a medical pathology of the ear is suspected to be caused or
#   aggravated by the wearing of hearing protectors. Whether that is so is a professional's judgement.
# custom:
#   cite: 29 CFR 1910.95(g)(8)(ii)(C)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, tester]
#   remedy: >-
#     Ask the reviewing audiologist, otolaryngologist or physician whether the worker is to be referred, enter the
#     answer, and refer the worker if it is yes.
package duty.shift_referral

import data.common
import rego.v2

obligations contains object.union(verdict(shift), {
	"key": shift.id,
	"health": shift.hearing,
	"because": common.refs([shift, shift.not_work_related, shift.referral_decision, shift.referral]),
}) if {
	some shift in followed_up
}

verdict(shift) := {
	"lifted": "a physician found that noise at work neither caused nor aggravated the shift",
	"cite": "29 CFR 1910.95(g)(8)(ii)",
} if {
	shift.not_work_related != null
} else := {
	"holds": true,
	"note": "the worker was referred",
} if {
	shift.referral_decision == null
	shift.referral != null
} else := question(shift, "no professional's decision on a referral is on record") if {
	shift.referral_decision == null
} else := {
	"holds": null,
	"missing": ["profession of who decided on the referral"],
	"note": sprintf("a referral was decided on %s, but it is not known by whom", [shift.referral_decision.date]),
} if {
	shift.referral_decision_by == null
} else := question(shift, "who decided on the referral is not an audiologist, otolaryngologist or physician") if {
	not shift.referral_decision_by in data.measures.hearing.professionals
} else := {
	"holds": null,
	"missing": ["outcome of the decision on a referral"],
	"note": sprintf("a referral was decided on %s, but not how", [shift.referral_decision.date]),
} if {
	shift.referral_needed == null
} else := {
	"holds": true,
	"on": shift.referral_decision.date,
	"note": "a professional decided that no referral is needed",
} if {
	shift.referral_needed == false
} else := {
	"after": shift.referral_decision.date,
	"by": shift.referral,
	"note": sprintf("a professional decided on %s that a referral is needed", [shift.referral_decision.date]),
}

question(shift, why) := {
	"ask": "Is more testing needed, or is a pathology of the ear suspected that protectors cause or aggravate?",
	"of": "physician, otolaryngologist or audiologist",
	"on": shift.date,
	"note": why,
}

# Shifts of workers in the program; after that only those on which something was decided or done.
followed_up := [shift | some shift in input.shifts; open_or_answered(shift)]

open_or_answered(shift) if shift.still_enrolled

open_or_answered(shift) if {
	some link in [shift.not_work_related, shift.referral_decision, shift.referral]
	link != null
}

not_owed contains "no audiogram made while in the program shows a shift" if count(input.shifts) == 0

not_owed contains "the worker is no longer in the program" if {
	count(input.shifts) > 0
	count(followed_up) == 0
}
