# METADATA
# title: Attenuation evaluated again
# description: >-
#   Attenuation is evaluated again whenever exposure rises so that the protectors in use may no longer be adequate, and
#   more effective ones are given where necessary. The paragraph sets no time.
# custom:
#   cite: 29 CFR 1910.95(j)(4)
#   subject: group
#   topic: protectors
#   severity: major
#   evidence: [change, document, protector_issue]
#   remedy: Estimate the level under the protectors in use with the exposure since the change, record the evaluation, and hand out better protectors where they are needed.
package duty.attenuation_reevaluated

import rego.v2

obligations contains {
	"key": change.id,
	"after": change.date,
	"by": change.evaluated,
	"note": sprintf("the change %s of %s raises exposure, so the attenuation is to be evaluated again", [change.id, change.date]),
	"because": [change.ref],
	"facts": {"change": change.what, "workers_with_protectors": input.protector_holders},
} if {
	some change in changes_that_matter
}

not_owed contains "no change that raises the exposure of workers with protectors" if count(changes_that_matter) == 0

changes_that_matter := [change |
	input.protector_holders > 0
	some change in input.changes
	change.raises_exposure == "yes"
	change.enrolling == true
]
