# METADATA
# title: Exemptions reviewed
# description: >-
#   An exemption from § 7 that the authority has granted is reviewed after four years at the latest, and lifted once
#   its grounds are gone.
# custom:
#   cite: LärmVibrationsArbSchV § 15(1)
#   subject: site
#   topic: controls
#   severity: minor
#   evidence: [document]
#   remedy: Ask the authority for the review, and record it.
package duty.exemption_reviewed

import rego.v2

obligations contains {
	"key": paper.ref,
	"after": latest(paper),
	"within": "exemption_review",
	"by": null,
	"note": "an exemption of the authority is in force",
	"because": [paper.ref],
} if {
	some paper in exemptions
}

obligations contains {
	"key": sprintf("first review of %s", [paper.ref]),
	"after": paper.date,
	"within": "exemption_review",
	"by": {"date": paper.reviewed_on, "ref": paper.ref},
	"because": [paper.ref],
} if {
	some paper in exemptions
	paper.reviewed_on != null
}

not_owed contains "no exemption of the authority is on record" if count(exemptions) == 0

exemptions := [paper | some paper in input.documents; paper.kind == "exemption"]

latest(paper) := paper.date if {
	paper.reviewed_on == null
} else := paper.reviewed_on
