# METADATA
# title: Review after damage from noise
# description: >-
#   Where damage is likely to come from noise at work, the employer reviews the risk assessment and the measures,
#   takes the doctor's advice into account, and arranges surveillance and an examination of others who are exposed
#   alike.
# custom:
#   cite: Directive 2003/10/EC Art 10(4)(b)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, examination]
#   remedy: Review what lacks, and record it for the worker concerned.
package duty.damage_reviewed

import rego.v2

# The law sets no time.
obligations contains {
	"key": sprintf("%s of %s", [what.key, case.damage.ref]),
	"after": case.opinion.date,
	"by": first_of(what.kinds, case),
	"note": sprintf("after damage that is likely to come from noise at work, %s", [what.words]),
	"because": [case.damage.ref, case.opinion.ref],
} if {
	some case in from_noise
	some what in asked
}

not_owed contains "no damage that is likely to come from noise at work is on record" if count(from_noise) == 0

asked := [
	{"key": "assessment", "kinds": {"assessment_reviewed"}, "words": "the risk assessment is reviewed"},
	{"key": "measures", "kinds": {"measures_reviewed", "controls_reviewed", "alternative_work"}, "words": "the measures are reviewed, with the doctor's advice"},
	{"key": "others", "kinds": {"group_reviewed"}, "words": "others who are exposed alike are examined"},
]

first_of(kinds, case) := {"date": done.date, "ref": done.ref} if {
	done := [done | some done in case.damage.follow_ups; done.kind in kinds; done.date >= case.opinion.date][0]
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
