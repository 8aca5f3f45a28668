# METADATA
# title: Protectors meet product law
# description: >-
#   Hearing protectors made available or provided meet the law on personal protective equipment that applies to
#   them; the Regulations of Northern Ireland name the Personal Protective Equipment Regulations 2002.
# custom:
#   cite: Control of Noise at Work Regulations reg 7(5)
#   subject: site
#   topic: protectors
#   severity: minor
#   evidence: [document]
#   remedy: Keep the declarations of conformity of all protectors in use, and withdraw those without one.
package duty.protector_conformity

import data.common
import rego.v2

obligations contains object.union(verdict, {"facts": {"workers_at_or_above_lower_value": input.enrolled_now}}) if exposed

verdict := {"holds": true, "note": "the conformity of the protectors is on file", "because": common.refs(covering)} if {
	count(covering) > 0
} else := {
	"holds": null,
	"note": "a record of the kind does not say what it covers",
	"missing": ["what the record covers"],
	"because": common.refs(silent),
} if {
	count(silent) > 0
} else := {"holds": false, "note": "no record shows that the protectors meet the law on personal protective equipment"}

not_owed contains "nobody is known to be at or above a lower exposure action value" if not exposed

exposed if "lower" in input.levels_now

papers := [paper | some paper in input.documents; paper.kind == "purchase_file"]

covering := [paper | some paper in papers; "protector_conformity" in paper.covers]

silent := [paper | some paper in papers; count(paper.covers) == 0]
