# METADATA
# title: Hearing loss entered in the injury log
# description: >-
#   A work-related standard threshold shift is recorded on the injury and illness log if the total hearing level, averaged
#   at 2000, 3000 and 4000 Hz and never corrected for age, is 25 dB or more above audiometric zero in the same ear. It is
#   entered within 7 calendar days of the information that the case has occurred; where a retest is made in time,
#   within 7 calendar days of the retest that confirms it. No entry is owed where a physician or other licensed
#   health care professional finds that the loss is not work-related and was not significantly aggravated by exposure
#   at work.
# custom:
#   cite: 29 CFR 1904.10(a); 1904.29(b)(3)
#   subject: worker
#   topic: reporting
#   severity: major
#   evidence: [follow_up, audiogram]
#   remedy: >-
#     Have a physician or other licensed health care professional judge whether the loss is work-related; unless it is
#     not, enter it on the log with the hearing-loss column ticked.
package duty.hearing_loss_recorded

import data.common
import rego.v2

obligations contains object.union(verdict(loss), {
	"key": loss.id,
	"facts": object.union(
		{"ears": loss.ears, "compared_with": loss.compared_with},
		{"retest_possible_until": day | day := loss.retest_until; day != null},
	),
	"health": loss.hearing,
	"because": records(loss),
}) if {
	some loss in input.recordables
}

verdict(loss) := {
	"lifted": "a licensed health care professional found that the loss is not work-related",
	"cite": "29 CFR 1904.10(b)(6)",
} if {
	loss.not_work_related != null
	loss.work_related == null
} else := question(loss, "two opinions on work-relatedness contradict each other") if {
	loss.not_work_related != null
	loss.entry == null
} else := {
	"within": "log_entry_time",
	"after": loss.known_on,
	"no_sooner_than": loss.retest_until,
	"by": loss.entry,
	"note": found(loss),
} if {
	work_related(loss)
} else := question(loss, "the opinion on record is not known to be a licensed professional's") if {
	loss.other_opinion != null
} else := question(loss, "no opinion on work-relatedness is on record")

# An employer who enters the loss has found it work-related.
work_related(loss) if loss.work_related != null

work_related(loss) if loss.entry != null

found(loss) := sprintf("the loss that the test of %s shows was found work-related", [loss.date]) if {
	loss.work_related != null
} else := sprintf("the loss that the test of %s shows was entered without an opinion on record", [loss.date])

question(loss, why) := {
	"ask": "Did noise at work cause the hearing loss, contribute to it or significantly aggravate it?",
	"of": "physician or other licensed health care professional",
	"on": loss.date,
	"note": why,
}

records(loss) := array.concat(
	[loss.ref, loss.compared_with],
	common.refs(links(loss)),
)

links(loss) := [loss.retest, loss.work_related, loss.not_work_related, loss.other_opinion, loss.entry, loss.removal]

not_owed contains "no audiogram meets the numbers of the recording rule" if count(input.recordables) == 0
