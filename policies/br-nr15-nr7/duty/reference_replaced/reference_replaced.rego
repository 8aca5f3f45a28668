# METADATA
# title: New reference exam after triggering or worsening
# description: >-
#   Where a sequential exam shows a significant change from the reference exam, it becomes the new reference exam,
#   in the ear concerned. The record of it is a baseline revision that names the exam. The text sets no time.
# custom:
#   cite: NR-7 Annex II item 4.3.1 (from memory)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [audiogram, follow_up]
#   remedy: >-
#     Enter a baseline revision for the ear and the exam that shows the change, so that later exams are compared
#     with it.
package duty.reference_replaced

import data.duty.change_assessed
import rego.v2

obligations contains {
	"key": sprintf("%s/%s", [case.id, ear]),
	"after": case.date,
	"by": revision(case, ear),
	"note": sprintf("%s ear: the exam of %s is to become the reference exam", [ear, case.date]),
	"because": [case.ref],
} if {
	some case in change_assessed.cases
	some ear in case.ears
}

revision(case, ear) := {"date": made[0].date, "ref": made[0].ref} if {
	made := [done |
		some done in case.follow_ups
		done.kind == "baseline_revision"
		concerns(done, ear)
	]
	count(made) > 0
} else := null

concerns(done, ear) if not done.ear in ({"left", "right"} - {ear})

not_owed contains "no exam is suggestive of triggering or worsening" if count(change_assessed.cases) == 0
