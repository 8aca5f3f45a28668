# METADATA
# title: Worker advised of an abnormal result
# description: >-
#   Where a test shows an abnormal audiogram or an abnormal shift the technician advises the worker. The wording of
#   2009 was read; it sets no time.
# custom:
#   cite: OHS Code, s. 223(3)(a)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [audiogram, examination, notice, follow_up]
#   remedy: Advise the worker of the result now, and record the day.
package duty.abnormal_advised

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
	list := sort(test.told)
	count(list) > 0
} else := null
