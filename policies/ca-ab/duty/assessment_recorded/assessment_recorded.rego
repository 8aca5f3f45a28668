# METADATA
# title: Record of the assessment
# description: >-
#   The record of an assessment holds its date, the workers or occupations, the type of equipment, the readings and
#   the location; since 31 March 2023 also the tasks that the worker carried out.
# custom:
#   cite: OHS Code, s. 220(1)
#   subject: group
#   topic: records
#   severity: minor
#   evidence: [measurement, task, document, group]
#   remedy: Complete the record of the assessment.
package duty.assessment_recorded

import data.common
import rego.v2

obligations contains {
	"key": latest.id,
	"holds": count(lacking) == 0,
	"on": latest.date,
	"note": note,
	"because": [latest.ref],
	"facts": {"lacking": sort(lacking)},
} if {
	count(input.measurements) > 0
}

not_owed contains "the group was never measured" if count(input.measurements) == 0

latest := input.measurements[count(input.measurements) - 1]

# Day and group stand on every measurement, so that date and workers are never lacking.
lacking := {content |
	some content in common.at(data.parameters.record_contents, latest.date)
	content in there_is_not
}

there_is_not := {"equipment" | latest.instrument == null} | (({"readings" | no_reading} | {"location" | input.area == null}) | {"tasks" | no_tasks})

no_reading if {
	latest.levelled == false
	latest.dosed == false
	latest.max_dba == null
}

no_tasks if {
	input.task_day == null
	not tasks_in_report
}

tasks_in_report if {
	some paper in input.documents
	paper.kind == "noise_measurement_report"
	"tasks" in paper.covers
}

note := sprintf("the record of the assessment of %s lacks: %s", [latest.date, concat(", ", sort(lacking))]) if {
	count(lacking) > 0
} else := null
