# METADATA
# title: Consultation on health surveillance (guidance)
# description: >-
#   Guidance, not law. The safety or employee representative and the employees concerned are consulted before health
#   surveillance is introduced.
# custom:
#   cite: HSE, Health surveillance for noise (guidance)
#   subject: site
#   topic: information
#   severity: minor
#   evidence: [document]
#   remedy: Consult the representatives and the employees concerned on health surveillance, and record it with what it was about.
package duty.surveillance_consultation

import data.common
import rego.v2

obligations contains object.union(verdict, {"facts": {"workers_at_or_above_lower_value": input.enrolled_now}}) if exposed

verdict := {"holds": true, "note": "employees and representatives were consulted on health surveillance", "because": common.refs(covering)} if {
	count(covering) > 0
} else := {
	"holds": null,
	"note": "a record of the kind does not say what it covers",
	"missing": ["what the record covers"],
	"because": common.refs(silent),
} if {
	count(silent) > 0
} else := {"holds": false, "note": "no record shows that employees and representatives were consulted on health surveillance"}

not_owed contains "nobody is known to be at or above an upper exposure action value" if not exposed

exposed if "upper" in input.levels_now

papers := [paper | some paper in input.documents; paper.kind == "consultation"]

covering := [paper | some paper in papers; "health_surveillance" in paper.covers]

silent := [paper | some paper in papers; count(paper.covers) == 0]
