# METADATA
# title: Appointment after an illness
# description: >-
#   An employer who learns of an illness that may come from the work offers an appointment without delay, to others
#   who do comparable work as well if they may be at risk.
# custom:
#   cite: ArbMedVV § 5(2)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [examination, follow_up]
#   remedy: Offer the appointment now, and have the physician judge whether others are at risk.
package duty.illness_appointment

import rego.v2

# Without delay; the law sets no time.
obligations contains {
	"key": case.ref,
	"after": case.date,
	"by": offer(case.date),
	"note": "an illness that may come from the work has become known",
	"because": [case.ref],
} if {
	some case in cases
}

obligations contains {
	"key": sprintf("others of %s", [case.ref]),
	"ask": "Are others who do comparable work at risk, too, so that appointments are to be offered to them?",
	"of": "occupational physician",
	"by": case.reviewed,
	"on": case.date,
	"because": [case.ref],
} if {
	some case in cases
}

not_owed contains "no illness that may come from the work is on record" if count(cases) == 0

cases := [{"ref": examination.ref, "date": known_on(examination), "reviewed": reviewed(examination)} |
	some examination in input.examinations
	examination.attended_on != null
	known_on(examination) != null
]

# Damage that was found, or an opinion that it comes from the work.
known_on(examination) := examination.attended_on if {
	examination.damage == true
} else := min(opinions(examination)) if {
	count(opinions(examination)) > 0
} else := null

opinions(examination) := [done.date | some done in examination.follow_ups; done.result == "work_related"]

reviewed(examination) := {"date": done.date, "ref": done.ref} if {
	done := [done | some done in examination.follow_ups; done.kind == "group_reviewed"][0]
} else := null

offer(day) := {"date": offers[0][0], "ref": offers[0][1]} if {
	offers := sort([[examination.offered_on, examination.ref] |
		some examination in input.examinations
		examination.kind == "health_appointment"
		examination.purpose == "illness"
		examination.offered_on >= day
	])
	count(offers) > 0
} else := null
