# METADATA
# title: Average of the week in place of the day
# description: >-
#   In duly justified cases, for activities in which the daily exposure varies markedly, the level of the week may be
#   used in place of that of the day, if adequate monitoring shows it to be no more than the limit and the risk is
#   reduced to a minimum.
# custom:
#   cite: Directive 2003/10/EC Art 3(3)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [group, document, measurement]
#   remedy: Use the level of the day, or show that the conditions for the week are met.
package duty.weekly_average

import data.common
import rego.v2

obligations contains {
	"key": "days vary",
	"holds": input.days_vary,
	"note": varies,
	"missing": [words | input.days_vary == null; words := "whether the daily exposure of the group varies markedly"],
} if {
	elected
}

obligations contains {
	"key": "grounds",
	"holds": count(papers) > 0,
	"note": grounds,
	"because": common.refs(papers),
} if {
	elected
}

obligations contains {
	"key": "level of the week",
	"value": input.now.channels.week.at_most,
	"at_most": "weekly_limit",
	"note": "level of the week, protectors left aside",
	"missing": ["the level of the week: the days worked in it and a measured level"],
	"because": [ref | some ref in [input.now.ref]; ref != null],
} if {
	elected
}

not_owed contains "the site does not use the average of the week" if input.choices.weekly_average == false

not_owed contains "the records do not show a day at or above the lower action level now" if {
	input.choices.weekly_average == true
	not noisy_day
}

elected if {
	input.choices.weekly_average == true
	noisy_day
}

noisy_day if common.any_current(input.exposed.daily_lower_reached)

papers := [paper | some paper in input.documents; paper.kind == "weekly_permission"]

varies := "the daily exposure of the group does not vary markedly, so that the day counts" if {
	input.days_vary == false
} else := null

grounds := "no record gives the grounds on which the week is taken in place of the day" if {
	count(papers) == 0
} else := null
