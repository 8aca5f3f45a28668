# METADATA
# title: Abnormal result forwarded
# description: >-
#   Where a test shows an abnormal audiogram or an abnormal shift the technician asks the worker for the relevant
#   medical history and forwards the results, the history and the baseline to the physician or audiologist whom the
#   employer has named. The wording of 2009 was read; it sets no time.
# custom:
#   cite: OHS Code, s. 223(3)(b), (c)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [audiogram, examination, follow_up]
#   remedy: Have results, history and baseline forwarded now, and record the day.
package duty.abnormal_forwarded

import data.duty.abnormal_confirmed
import rego.v2

obligations contains {
	"key": test.id,
	"after": test.date,
	"by": first(test),
	"note": sprintf("the test of %s is abnormal", [test.date]),
	"because": [test.ref],
	"health": {"definitions_met": test.definitions},
} if {
	some test in abnormal_confirmed.abnormal
}

not_owed contains "no test under the program is known to be abnormal" if count(abnormal_confirmed.abnormal) == 0

first(test) := {"date": list[0][0], "ref": list[0][1]} if {
	list := sort([[done.date, done.ref] | some done in test.done; done.kind in ["referral", "history_forwarded"]])
	count(list) > 0
} else := null
