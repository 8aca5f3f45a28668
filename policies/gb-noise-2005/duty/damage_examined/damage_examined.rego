# METADATA
# title: Examination by a doctor after hearing damage was found
# description: >-
#   Where health surveillance finds that an employee has hearing damage that can be identified, the employer ensures
#   that a doctor examines the employee. Damage that is found again before that is no further case.
# custom:
#   cite: Control of Noise at Work Regulations reg 9(4)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [examination, follow_up]
#   remedy: Have a doctor examine the worker, and record the day and who it was.
package duty.damage_examined

import rego.v2

obligations contains object.union(verdict(damage), {
	"key": damage.date,
	"on": damage.date,
}) if {
	some damage in damages
}

not_owed contains "no hearing damage is on record" if count(damages) == 0

verdict(damage) := {
	"holds": true,
	"note": "a doctor has examined the worker",
	"because": [damage.ref, by_doctor(damage)[0].ref],
} if {
	count(by_doctor(damage)) > 0
} else := {
	"holds": null,
	"note": sprintf("the worker was examined on %s, and it is not known by whom", [by_somebody(damage)[0].date]),
	"missing": ["the profession of the examiner"],
	"because": [damage.ref, by_somebody(damage)[0].ref],
} if {
	count(by_somebody(damage)) > 0
} else := {
	"holds": false,
	"note": "hearing damage was found, and no examination by a doctor is on record",
	"because": [damage.ref],
}

by_doctor(damage) := [act | some act in examined(damage); act.by_is in data.measures.hearing.physicians]

by_somebody(damage) := [act | some act in examined(damage); act.by_is == null]

# An examination recorded as a follow-up, a doctor's opinion, or the examination itself that found it.
examined(damage) := array.concat(
	[damage | damage.examined == true],
	[act | some act in since(damage); act.kind in ["damage_examined", "damage_opinion"]],
)

# Hearing damage that was found: as the outcome of an examination, or recorded as found in an audiogram. What follows
# from it, the other duties of regulation 9(4) take from here.
damages := [damage | some i, damage in findings; not said_before(i)]

# Found twice on one day, or found again while no doctor has examined the worker since an earlier finding: one case.
said_before(i) if {
	some j, other in findings
	j < i
	other.date == findings[i].date
}

said_before(i) if {
	some other in findings
	other.date < findings[i].date
	count([act | some act in by_doctor(other); act.date < findings[i].date]) == 0
}

findings := array.concat(
	[{"date": e.attended_on, "ref": e.ref, "by_is": e.by_is, "examined": true} |
		some e in input.examinations
		e.damage == true
		e.attended_on != null
	],
	[{"date": act.date, "ref": act.ref, "by_is": null, "examined": false} |
		some audiogram in input.audiograms
		some act in audiogram.follow_ups
		act.kind == "damage_found"
	],
)

since(damage) := [act | some act in acts; act.date >= damage.date]

# Everything done after a test, on whichever record it hangs; once, and in order of date.
acts := [act | some entry in sort({[act.date, act.ref, act] | some act in done}); act := entry[count(entry) - 1]]

done := array.concat(
	[act | some e in input.examinations; some act in e.follow_ups],
	[act | some audiogram in input.audiograms; some act in audiogram.follow_ups],
)

# Doctors' opinions on whether noise is likely to be the cause.
opinions(damage) := [act |
	some act in since(damage)
	act.kind == "damage_opinion"
	act.by_is in data.measures.hearing.physicians
]
