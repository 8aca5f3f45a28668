# METADATA
# title: Contents of the risk assessment
# description: >-
#   The risk assessment includes nine heads: the level, type and duration of exposure, with peaks; effects on groups
#   at particular risk; so far as practicable, substances toxic to the ear and vibration; the audibility of warning
#   signals; information of makers; quieter equipment; exposure beyond normal hours and in rest rooms; information
#   from health surveillance; and the availability of adequate protectors.
# custom:
#   cite: Control of Noise at Work Regulations reg 5(3)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [document]
#   remedy: Complete the risk assessment by the heads that are missing, or record which heads it covers.
package duty.assessment_content

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"key": "contents",
	"because": [latest.ref],
	"facts": {"covers": latest.covers, "dated": latest.date},
}) if {
	concerned
	count(papers) > 0
}

verdict := {
	"holds": null,
	"missing": ["a list of the contents that is in force"],
	"note": "no list of the contents is in force on the day judged",
} if {
	required == null
} else := {
	"holds": null,
	"missing": ["what the risk assessment covers"],
	"note": sprintf("the risk assessment of %s does not say what it covers", [latest.date]),
} if {
	count(latest.covers) == 0
} else := {
	"holds": false,
	"note": sprintf("the risk assessment of %s leaves out: %s", [latest.date, common.in_words(left_out)]),
} if {
	count(left_out) > 0
} else := {
	"holds": true,
	"note": sprintf("the risk assessment of %s covers every head", [latest.date]),
}

required := common.at(data.parameters.assessment_heads, input.as_of)

left_out := [head | some head in required; not head in latest.covers]

papers := [paper | some paper in input.documents; paper.kind == "risk_assessment"]

latest := papers[count(papers) - 1]

concerned if {
	input.suspected_noisy == true
	some stretch in input.exposure_unknown.lower
	common.covers(stretch, input.as_of)
}

concerned if common.any_current(input.exposed.lower)

not_owed contains "nothing suggests noise at a lower exposure action value" if not concerned

not_owed contains "there is no risk assessment, which is a finding of its own" if {
	concerned
	count(papers) == 0
}
