# METADATA
# title: Risk assessment reviewed after hearing damage by noise
# description: >-
#   If the doctor or specialist considers hearing damage likely to be the result of exposure to noise, the employer
#   reviews the risk assessment.
# custom:
#   cite: Control of Noise at Work Regulations reg 9(4)(b)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, examination]
#   remedy: Review the risk assessment in view of the damage, and record it.
package duty.damage_assessment_reviewed

import data.duty.damage_examined as found
import rego.v2

obligations contains {
	"key": damage.date,
	"after": noise(damage)[0].date,
	"by": first(damage),
	"note": sprintf("a doctor considered on %s that the damage is likely to be the result of noise, so the risk assessment is to be reviewed", [noise(damage)[0].date]),
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
	act := [act | some act in found.since(damage); act.kind == "assessment_reviewed"][0]
} else := null
