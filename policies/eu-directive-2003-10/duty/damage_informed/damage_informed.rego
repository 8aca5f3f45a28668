# METADATA
# title: Worker told of damage from noise
# description: >-
#   Where damage is likely to come from noise at work, the worker is told by the doctor or another suitably qualified
#   person of the result that concerns them.
# custom:
#   cite: Directive 2003/10/EC Art 10(4)(a)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, examination]
#   remedy: Let the doctor tell the worker, and record the day.
package duty.damage_informed

import rego.v2

# The law sets no time.
obligations contains {
	"key": case.damage.ref,
	"after": case.opinion.date,
	"by": told(case.damage),
	"note": "a doctor finds that noise at work is likely to have damaged the worker's hearing",
	"because": [case.damage.ref, case.opinion.ref],
} if {
	some case in from_noise
}

not_owed contains "no damage that is likely to come from noise at work is on record" if count(from_noise) == 0

told(damage) := {"date": done.date, "ref": done.ref} if {
	done := [done | some done in damage.follow_ups; done.kind == "worker_informed"][0]
} else := {"date": damage.told_on, "ref": damage.ref} if {
	damage.told_on != null
} else := null

# The latest opinion on the cause counts, so that of a specialist after that of the doctor.
from_noise := [{"damage": damage, "opinion": done} |
	some damage in found
	said := opinions(damage)
	done := said[count(said) - 1]
	done.result == "work_related"
]

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
	done.result in {"work_related", "not_work_related"}
]
