# METADATA
# title: Surveillance continued and others reviewed after hearing damage by noise
# description: >-
#   If the doctor or specialist considers hearing damage likely to be the result of exposure to noise, the employer
#   ensures continued health surveillance and provides for a review of the health of any other employee who has been
#   similarly exposed.
# custom:
#   cite: Control of Noise at Work Regulations reg 9(4)(e)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, examination]
#   remedy: Continue the surveillance, have the health of those similarly exposed reviewed, and record it.
package duty.damage_others_reviewed

import data.duty.damage_examined as found
import rego.v2

obligations contains {
	"key": damage.date,
	"after": noise(damage)[0].date,
	"by": first(damage),
	"note": sprintf("a doctor considered on %s that the damage is likely to be the result of noise, so the health of those similarly exposed is to be reviewed", [noise(damage)[0].date]),
	"because": [damage.ref, noise(damage)[0].ref],
} if {
	some damage in found.damages
	count(noise(damage)) > 0
}

obligations contains {
	"key": damage.date,
	"lifted": "a doctor does not consider the damage likely to be the result of noise",
	"cite": "Control of Noise at Work Regulations reg 9(4)",
	"on": damage.date,
	"because": [damage.ref, cleared(damage)[0].ref],
} if {
	some damage in found.damages
	count(noise(damage)) == 0
	count(cleared(damage)) > 0
}

not_owed contains "no hearing damage is on record, or no doctor's opinion on its cause" if {
	every damage in found.damages {
		count(noise(damage)) == 0
		count(cleared(damage)) == 0
	}
}

noise(damage) := [opinion | some opinion in found.opinions(damage); opinion.result == "work_related"]

cleared(damage) := [opinion | some opinion in found.opinions(damage); opinion.result == "not_work_related"]

first(damage) := {"date": act.date, "ref": act.ref} if {
	act := [act | some act in found.since(damage); act.kind == "group_reviewed"][0]
} else := null
