# METADATA
# title: Calculator for several tasks
# description: >-
#   Where the employer shortens the daily exposure of workers with more than one task at risk, the daily level is
#   computed with the calculator that the authority publishes.
# custom:
#   cite: r. 13, s. 137(2)
#   subject: group
#   topic: controls
#   severity: minor
#   evidence: [document]
#   remedy: Compute the day with the authority's calculator and file a dated print.
package duty.calculator_used

import data.common
import rego.v2

obligations contains {
	"key": latest.date,
	"holds": holds,
	"note": note,
	"missing": common.missing(holds, "the tasks that the schedule covers"),
	"because": array.concat([latest.ref], common.refs(prints)),
	"facts": {"tasks": latest.covers},
} if {
	count(schedules) > 0
	count(latest.covers) != 1
}

not_owed contains "no schedule shortens the daily exposure" if count(schedules) == 0

not_owed contains "the schedule has one task only" if {
	count(schedules) > 0
	count(latest.covers) == 1
}

prints := [paper | some paper in input.documents; paper.kind == "calculator"; paper.date >= latest.date]

holds if {
	count(prints) > 0
} else := null if {
	count(latest.covers) == 0
} else := false

note := "no print of the calculator since the schedule is on record" if {
	count(prints) == 0
} else := null

# The latest schedule that shortens the daily exposure, since the section came into force.
schedules := [paper |
	some paper in input.documents
	paper.kind == "schedule"
	common.at(data.parameters.sections_in_force, paper.date) != null
]

latest := schedules[count(schedules) - 1]
