# METADATA
# title: Work-accident communication (CAT)
# description: >-
#   Where triggering or worsening is confirmed as occupational, the organization issues the work-accident
#   communication (CAT, comunicação de acidente do trabalho) by the next working day. The time is counted from the
#   day of the physician's opinion.
# custom:
#   cite: NR-7 7.5.19.5; Law 8.213/1991 art. 22 (from memory)
#   subject: worker
#   topic: reporting
#   severity: major
#   evidence: [follow_up, audiogram]
#   remedy: >-
#     Issue the CAT and record it as a report to the authority (authority_report) that names the exam.
package duty.accident_communication

import data.duty.change_assessed
import rego.v2

obligations contains {
	"key": case.id,
	"after": found(case).date,
	"within": "cat_time",
	"by": communication(case),
	"note": "the physician found the case work-related",
	"because": [case.ref, found(case).ref],
} if {
	some case in work_related
}

communication(case) := {"date": issued[0].date, "ref": issued[0].ref} if {
	issued := [done | some done in case.follow_ups; done.kind == "authority_report"]
	count(issued) > 0
} else := null

# The first opinion of a physician that finds the case work-related.
found(case) := opinions[0] if {
	opinions := [done |
		some done in case.follow_ups
		done.kind == "medical_opinion"
		done.result == "work_related"
		done.by_is in data.measures.hearing.physicians
	]
	count(opinions) > 0
}

work_related := [case | some case in change_assessed.cases; found(case)]

not_owed contains "no physician has found triggering or worsening to be work-related" if count(work_related) == 0
