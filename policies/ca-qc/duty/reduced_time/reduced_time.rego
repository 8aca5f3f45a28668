# METADATA
# title: Daily exposure time reduced
# description: >-
#   Where the employer shortens the daily exposure, no worker is exposed longer than the table allows: 8 hours at 85
#   dBA, half the time for each 3 dB more. By the energy rule of the table this is a daily level of at most 85 dBA,
#   measured with the schedule in force.
# custom:
#   cite: r. 13, s. 137(1)
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [document, measurement, task]
#   remedy: Shorten the exposure further, or describe the day by its tasks and measure it with the schedule in force.
package duty.reduced_time

import data.common
import rego.v2

obligations contains {
	"key": latest.date,
	"value": level,
	"at_most": "daily_limit",
	"note": sprintf("daily level with the schedule of %s", [latest.date]),
	"missing": common.missing(level, "a daily level measured since the schedule"),
	"because": array.concat([latest.ref], used),
} if {
	count(schedules) > 0
}

not_owed contains "no schedule shortens the daily exposure" if count(schedules) == 0

since_schedule if input.now.measured_on >= latest.date

default level := null

level := input.now.channels.day.at_most if since_schedule

used := [input.now.ref | since_schedule]

# The latest schedule that shortens the daily exposure, since the section came into force.
schedules := [paper |
	some paper in input.documents
	paper.kind == "schedule"
	common.at(data.parameters.sections_in_force, paper.date) != null
]

latest := schedules[count(schedules) - 1]
