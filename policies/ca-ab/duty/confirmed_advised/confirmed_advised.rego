# METADATA
# title: Worker advised of a confirmed result
# description: >-
#   The physician or audiologist who confirms an abnormal result advises the worker within 30 days. The time is from
#   memory.
# custom:
#   cite: OHS Code, s. 223(4)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, notice, examination]
#   remedy: Have the worker advised of the confirmed result now, and record the day.
package duty.confirmed_advised

import data.duty.abnormal_confirmed
import rego.v2

obligations contains {
	"key": test.id,
	"after": opinion[0],
	"within": "confirmed_notice_time",
	"by": first_since(test, opinion[0]),
	"note": sprintf("the result of the test of %s was confirmed on %s", [test.date, opinion[0]]),
	"because": [test.ref, opinion[1]],
	"health": {"definitions_met": test.definitions},
} if {
	some test in abnormal_confirmed.abnormal
	opinion := opinions(test)[0]
}

not_owed contains "no abnormal result was confirmed" if {
	every test in abnormal_confirmed.abnormal {
		count(opinions(test)) == 0
	}
}

first_since(test, day) := {"date": list[0][0], "ref": list[0][1]} if {
	list := sort([told | some told in test.told; told[0] >= day])
	count(list) > 0
} else := null

opinions(test) := sort([[done.date, done.ref] |
	some done in test.done
	done.kind == "medical_opinion"
	may_confirm(done.by_is)
])

may_confirm(profession) if profession == null

may_confirm(profession) if profession in ["physician", "otolaryngologist", "audiologist"]
