# METADATA
# title: Average of the week in place of the day
# description: >-
#   In special cases the authority may permit, for work whose exposure varies considerably from day to day, that the
#   level of the week is used for the action values, if a suitable measurement shows it to be no more than 85 dB(A)
#   and the risk is reduced to a minimum.
# custom:
#   cite: LärmVibrationsArbSchV § 15(2)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [group, document, measurement]
#   remedy: Use the level of the day, or obtain the permission and show that its conditions are met.
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
	"key": "permission",
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

grounds := "no permission of the authority to take the week in place of the day is on record" if {
	count(papers) == 0
} else := null
