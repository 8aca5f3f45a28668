# METADATA
# title: Condition of the weekly average
# description: >-
#   The weekly personal noise exposure may take the place of the daily one only where the exposure of an employee
#   varies markedly from day to day. The law gives no test of it; whoever assesses records it for the group.
# custom:
#   cite: Control of Noise at Work Regulations reg 4(4)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [group]
#   remedy: Use the daily exposure for this group, or record that its exposure varies markedly from day to day.
package duty.weekly_average

import data.common
import rego.v2

obligations contains {
	"holds": input.days_vary,
	"note": said[input.days_vary],
	"missing": ["whether the exposure varies markedly from day to day" | input.days_vary == null],
	"facts": {"workers": input.workers},
} if {
	input.choices.weekly_average == true
	noisy
}

not_owed contains "the site uses the daily exposure" if input.choices.weekly_average == false

not_owed contains "nothing suggests noise at a lower exposure action value" if {
	input.choices.weekly_average == true
	not noisy
}

noisy if input.suspected_noisy == true

noisy if {
	some found in [input.first_survey, input.task_day]
	found != null
	input.suspected_noisy == null
}

# Noise that reaches a lower value on the day, whatever was expected.
noisy if common.at(data.parameters.lower_action_value, input.as_of) <= input.now.channels.daily.at_most

said := {
	true: "the exposure of the group varies markedly from day to day",
	false: "the site averages over the week, but the exposure of the group does not vary markedly from day to day",
	null: "the site averages over the week, and it is not known whether the exposure of the group varies markedly from day to day",
}
