# METADATA
# title: Surveillance under an occupational-health professional (guidance)
# description: >-
#   Guidance, not law. The whole programme of health surveillance is under the control of an occupational-health
#   professional, such as a doctor or a suitably trained nurse; the employer stays responsible for its proper
#   running.
# custom:
#   cite: HSE, Health surveillance for noise (guidance)
#   subject: site
#   topic: audiometry
#   severity: minor
#   evidence: [document]
#   remedy: Put the programme under the control of an occupational-health professional, and record the arrangement.
package duty.surveillance_professional

import data.common
import rego.v2

obligations contains object.union(verdict, {"facts": {"workers_at_or_above_lower_value": input.enrolled_now}}) if exposed

verdict := {"holds": true, "note": "the programme is under the control of an occupational-health professional", "because": common.refs(covering)} if {
	count(covering) > 0
} else := {
	"holds": null,
	"note": "a record of the kind does not say what it covers",
	"missing": ["what the record covers"],
	"because": common.refs(silent),
} if {
	count(silent) > 0
} else := {"holds": false, "note": "no record shows that an occupational-health professional is in control of the programme"}

not_owed contains "nobody is known to be at or above an upper exposure action value" if not exposed

exposed if "upper" in input.levels_now

papers := [paper | some paper in input.documents; paper.kind == "surveillance_arrangement"]

covering := [paper | some paper in papers; "health_professional" in paper.covers]

silent := [paper | some paper in papers; count(paper.covers) == 0]
