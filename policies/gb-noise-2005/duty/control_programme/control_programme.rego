# METADATA
# title: Programme of measures
# description: >-
#   If any employee is likely to be exposed at or above an upper exposure action value, exposure is reduced to as
#   low a level as is reasonably practicable by a programme of organisational and technical measures, which excludes
#   hearing protectors.
# custom:
#   cite: Control of Noise at Work Regulations reg 6(2)
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement, document]
#   remedy: Draw up a programme of organisational and technical measures for the group, with actions and dates, and carry it out.
package duty.control_programme

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": sprintf("the latest programme of measures is of %s", [papers[count(papers) - 1].date]),
	"because": common.refs(papers),
	"facts": {"workers": input.workers},
} if {
	at_upper
	count(papers) > 0
}

obligations contains {
	"holds": false,
	"note": "the group is at or above an upper exposure action value, and no programme of measures is on record",
	"facts": {"workers": input.workers},
} if {
	at_upper
	count(papers) == 0
}

obligations contains {
	"holds": null,
	"note": sprintf("it is not known whether the group is at or above an upper exposure action value: %s", [concat("; ", not_known)]),
	"missing": ["an exposure that can be held against the upper exposure action values"],
	"facts": {"workers": input.workers},
} if {
	not at_upper
	count(not_known) > 0
}

not_owed contains "the group is not at or above an upper exposure action value, or nothing is known of its noise" if {
	not at_upper
	count(not_known) == 0
}

at_upper if common.any_current(input.exposed.upper)

# Of a group whose levels were never assessed levels-assessed tells.
not_known := [stretch.reason |
	some found in [input.first_survey, input.task_day]
	found != null
	some stretch in input.exposure_unknown.upper
	common.covers(stretch, input.as_of)
]

papers := [paper | some paper in input.documents; paper.kind == "control_programme"]
