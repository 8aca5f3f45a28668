# METADATA
# title: Contents of the programme of measures
# description: >-
#   In reducing noise the employer considers working methods, the choice of equipment, the layout of workplaces,
#   information and training, technical means, maintenance, limits on duration and intensity, and schedules with
#   rest.
# custom:
#   cite: Control of Noise at Work Regulations reg 6(3)
#   subject: group
#   topic: controls
#   severity: minor
#   evidence: [document]
#   remedy: Consider the heads that are missing and enter them in the programme, or record which heads it covers.
package duty.control_content

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
	"missing": ["what the programme of measures covers"],
	"note": sprintf("the programme of measures of %s does not say what it covers", [latest.date]),
} if {
	count(latest.covers) == 0
} else := {
	"holds": false,
	"note": sprintf("the programme of measures of %s leaves out: %s", [latest.date, common.in_words(left_out)]),
} if {
	count(left_out) > 0
} else := {
	"holds": true,
	"note": sprintf("the programme of measures of %s covers every head", [latest.date]),
}

required := common.at(data.parameters.control_heads, input.as_of)

left_out := [head | some head in required; not head in latest.covers]

papers := [paper | some paper in input.documents; paper.kind == "control_programme"]

latest := papers[count(papers) - 1]

concerned if common.any_current(input.exposed.upper)

not_owed contains "the group is not known to be at or above an upper exposure action value" if not concerned

not_owed contains "there is no programme of measures, which is a finding of its own" if {
	concerned
	count(papers) == 0
}
