# METADATA
# title: Hearing conservation programme
# description: >-
#   The physician in charge of the PCMSO takes part in putting in place, improving and controlling a programme for
#   the conservation of hearing (PCA) where cases arise. No regulatory norm prescribes its structure; Fundacentro
#   published a guide in 2018. This bundle asks for one wherever workers are above the action level, before
#   the first case as well. The record is a document of kind hearing_conservation_programme.
# custom:
#   cite: NR-7 Annex II items 9 c and 10 (from memory)
#   subject: site
#   topic: follow-up
#   severity: minor
#   evidence: [document]
#   remedy: >-
#     Draw up the programme together with the occupational physician and file it.
package duty.conservation_programme

import rego.v2

obligations contains {
	"holds": true,
	"on": latest.date,
	"note": "a hearing conservation programme is on record",
	"because": [latest.ref],
	"facts": {"covers": latest.covers},
} if {
	concerned
	count(programmes) > 0
}

obligations contains {
	"holds": false,
	"note": "workers are above the action level and no hearing conservation programme is on record",
	"facts": {"workers_above_the_action_level": input.enrolled_now},
} if {
	concerned
	count(programmes) == 0
}

not_owed contains "no worker of the site is known to be above the action level now" if not concerned

concerned if input.enrolled_now > 0

programmes := [document | some document in input.documents; document.kind == "hearing_conservation_programme"]

latest := programmes[count(programmes) - 1]
