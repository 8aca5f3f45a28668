# METADATA
# title: Protectors in good condition
# description: >-
#   The operator ensures that each hearing protector is in good condition and is maintained by the manufacturer's
#   instructions.
# custom:
#   cite: 30 CFR 62.160(a)(3)
#   subject: site
#   topic: protectors
#   severity: minor
#   evidence: [document]
#   remedy: >-
#     Have the protectors inspected, cleaned and replaced by the instructions, and keep a note of it.
package duty.protector_maintenance

import data.common
import rego.v2

obligations contains {"holds": true, "on": papers[0].date, "because": common.refs(papers)} if {
	affected
	count(papers) > 0
}

obligations contains {"holds": false, "note": "no record shows that protectors are inspected and maintained"} if {
	affected
	count(papers) == 0
}

not_owed contains "nobody has been at or above the action level" if not affected

affected if input.enrolled_ever > 0

papers := [paper | some paper in input.documents; paper.kind == "protector_maintenance"]
