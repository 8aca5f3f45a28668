# METADATA
# title: Contents of the health record (guidance)
# description: >-
#   Guidance, not law. The health record names the worker and, for each procedure, its day, who did it and the
#   outcome in terms of fitness or restriction; clinical data do not belong in it.
# custom:
#   cite: HSE, Record keeping in health surveillance (guidance)
#   subject: worker
#   topic: records
#   severity: minor
#   evidence: [examination]
#   remedy: 'Complete the health record: day, examiner and outcome of each test.'
package duty.health_record_content

import data.common
import rego.v2

obligations contains {
	"key": examination.id,
	"on": examination.attended_on,
	"holds": count(lacking(examination)) == 0,
	"note": said(examination),
	"because": [examination.ref],
} if {
	some examination in attended
}

not_owed contains "no procedure of health surveillance is on record as attended" if count(attended) == 0

attended := [e | some e in input.examinations; e.attended_on != null]

lacking(examination) := array.concat(
	common.missing(examination.result, "the outcome"),
	common.missing(examination.by_is, "who did it"),
)

said(examination) := "day, examiner and outcome are on record" if {
	count(lacking(examination)) == 0
} else := sprintf("the record lacks %s", [concat(" and ", lacking(examination))])
