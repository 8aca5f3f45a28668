# METADATA
# title: Copies of the exams to the worker
# description: >-
#   In cases of triggering or worsening, the physician in charge of the PCMSO gives the employee copies of the
#   audiometric exams. The text sets no time.
# custom:
#   cite: NR-7 Annex II item 9 d (from memory)
#   subject: worker
#   topic: notice
#   severity: minor
#   evidence: [notice, audiogram]
#   remedy: >-
#     Give the worker copies of the exams, and record it as a notice of the result.
package duty.copies_given

import data.duty.change_assessed
import rego.v2

obligations contains {
	"key": case.id,
	"after": case.date,
	"by": given(case),
	"note": "the worker is to have copies of the exams",
	"because": [case.ref],
} if {
	some case in change_assessed.cases
}

given(case) := {"date": told[0].date, "ref": told[0].ref} if {
	told := [notice | some notice in case.notices; notice.about in {"result", "abnormal_result", "shift"}]
	count(told) > 0
} else := null

not_owed contains "no exam is suggestive of triggering or worsening" if count(change_assessed.cases) == 0
