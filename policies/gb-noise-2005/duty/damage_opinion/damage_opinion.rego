# METADATA
# title: Cause of hearing damage
# description: >-
#   The doctor, or a specialist to whom the doctor refers the employee, considers whether hearing damage is likely
#   to be the result of exposure to noise. The law asks for this judgement; the program never makes it.
# custom:
#   cite: Control of Noise at Work Regulations reg 9(4)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [examination, follow_up]
#   remedy: Ask the doctor whether the damage is likely to be the result of noise, and record the answer.
package duty.damage_opinion

import data.duty.damage_examined as found
import rego.v2

obligations contains object.union(verdict(damage), {"key": damage.date}) if {
	some damage in found.damages
}

not_owed contains "no hearing damage is on record" if count(found.damages) == 0

verdict(damage) := {
	"ask": "Is the hearing damage likely to be the result of exposure to noise?",
	"of": "doctor",
	"on": damage.date,
	"note": "no opinion of a doctor on the cause is on record",
	"because": [damage.ref],
} if {
	count(found.opinions(damage)) == 0
} else := {
	"holds": null,
	"on": damage.date,
	"note": "a doctor gave an opinion on the cause, and the record does not say what it was",
	"missing": ["the opinion"],
	"because": [damage.ref, found.opinions(damage)[0].ref],
} if {
	every opinion in found.opinions(damage) { not opinion.result in ["work_related", "not_work_related"] }
} else := {
	"holds": true,
	"on": damage.date,
	"note": "a doctor has given an opinion on the cause",
	"because": [damage.ref, found.opinions(damage)[0].ref],
}
