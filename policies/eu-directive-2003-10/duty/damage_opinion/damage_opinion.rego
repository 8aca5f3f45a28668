# METADATA
# title: Cause of hearing damage judged
# description: >-
#   Where surveillance finds identifiable damage to hearing, a doctor, or a specialist if the doctor sees the need,
#   assesses whether it is likely to be the result of exposure to noise at work.
# custom:
#   cite: Directive 2003/10/EC Art 10(4)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [examination, audiogram, follow_up]
#   remedy: Have a doctor judge the cause, and record the outcome.
package duty.damage_opinion

import rego.v2

obligations contains {
	"key": damage.ref,
	"ask": "Is the damage to hearing likely to be the result of exposure to noise at work?",
	"of": "physician or specialist",
	"by": answered(damage),
	"on": damage.date,
	"because": [damage.ref],
} if {
	some damage in found
}

not_owed contains "no identifiable damage to hearing is on record" if count(found) == 0

answered(damage) := null if {
	count(opinions(damage)) == 0
} else := {"date": done.date, "ref": done.ref} if {
	done := opinions(damage)[0]
}

# Damage that an examination found, or that was noted after a hearing test.
found := array.concat(
	[{"ref": examination.ref, "date": examination.attended_on, "follow_ups": examination.follow_ups, "told_on": examination.results_on} |
		some examination in input.examinations
		examination.damage == true
	],
	[{"ref": test.ref, "date": test.date, "follow_ups": test.follow_ups, "told_on": null} |
		some test in input.audiograms
		some done in test.follow_ups
		done.kind == "damage_found"
	],
)

opinions(damage) := [done |
	some done in damage.follow_ups
	done.kind in {"damage_opinion", "medical_opinion"}
	done.result != null
]
