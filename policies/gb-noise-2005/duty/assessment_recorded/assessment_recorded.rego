# METADATA
# title: Findings and planned measures recorded
# description: >-
#   As soon as practicable after the assessment is made or changed, its significant findings are recorded, and the
#   measures taken or intended to meet regulations 6, 7 and 10.
# custom:
#   cite: Control of Noise at Work Regulations reg 5(6)
#   subject: group
#   topic: records
#   severity: major
#   evidence: [document]
#   remedy: Write down the significant findings and a plan of measures with dates, and record that the assessment holds both.
package duty.assessment_recorded

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

required := common.at(data.parameters.assessment_record, input.as_of)

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
