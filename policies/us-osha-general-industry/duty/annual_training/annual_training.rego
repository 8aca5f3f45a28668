# METADATA
# title: Annual training
# description: >-
#   The employer trains each employee who is exposed to noise at or above the action level, institutes a training program
#   and ensures that employees participate in it. The training is repeated annually for each employee in the hearing
#   conservation program, and kept up to date with changes in protective equipment and work processes.
# custom:
#   cite: 29 CFR 1910.95(k)(1)-(2)
#   subject: worker
#   topic: training
#   severity: major
#   evidence: [training]
#   remedy: Train the worker now, on all three topics, and keep a record of the day and the topics.
package duty.annual_training

import rego.v2

obligations contains {"every": "training_interval", "during": stretch, "by": "training.any"} if {
	not once_in_each_calendar_year
	some stretch in in_program
}

obligations contains {"every": "training_interval_calendar", "during": stretch, "by": "training.any"} if {
	once_in_each_calendar_year
	some stretch in in_program
}

once_in_each_calendar_year if input.choices.annual == "calendar_year"

in_program := [{"from": stretch.from, "to": stretch.to} | some stretch in input.enrolled]

not_owed contains "no stretch at or above the action level is known" if count(input.enrolled) == 0
