# METADATA
# title: Removal from exposure and referral to social security
# description: >-
#   Where triggering or worsening is confirmed as occupational, the organization removes the worker from the
#   exposure if needed, and refers the worker to social security (Previdência Social). Whether that is needed is
#   the physician's judgement.
# custom:
#   cite: NR-7 7.5.19.5 (from memory)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, audiogram]
#   remedy: >-
#     Ask the occupational physician whether the worker is to be taken out of the noise and referred, and enter
#     the answer as a referral_decision, referral or alternative_work.
package duty.removal_and_referral

import data.duty.change_assessed
import rego.v2

obligations contains {
	"key": case.id,
	"ask": "Is the worker to be taken out of the noise, and to be referred to social security?",
	"of": "occupational physician",
	"by": answer(case),
	"on": found(case).date,
	"note": "the physician found the case work-related",
	"because": [case.ref, found(case).ref],
} if {
	some case in work_related
}

answer(case) := {"date": answers[0].date, "ref": answers[0].ref} if {
	answers := [done |
		some done in case.follow_ups
		done.kind in {"referral_decision", "referral", "alternative_work"}
	]
	count(answers) > 0
} else := null

# The first opinion of a physician that finds the case work-related.
found(case) := opinions[0] if {
	opinions := [done |
		some done in case.follow_ups
		done.kind == "medical_opinion"
		done.result == "work_related"
		done.by_is in data.measures.hearing.physicians
	]
	count(opinions) > 0
}

work_related := [case | some case in change_assessed.cases; found(case)]

not_owed contains "no physician has found triggering or worsening to be work-related" if count(work_related) == 0
