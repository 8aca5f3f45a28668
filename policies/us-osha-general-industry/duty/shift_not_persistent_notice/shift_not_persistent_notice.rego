# METADATA
# title: Told that a shift did not persist
# description: >-
#   If subsequent audiometric testing of an employee whose exposure is below the limit of Table G-16 indicates that a
#   standard threshold shift is not persistent, the employer informs the employee of the new audiometric interpretation,
#   and may then discontinue the required use of hearing protectors for that employee.
# custom:
#   cite: 29 CFR 1910.95(g)(8)(iii)(A)
#   subject: worker
#   topic: follow-up
#   severity: minor
#   evidence: [notice, audiogram]
#   remedy: Tell the worker how the later audiogram was interpreted, and keep a record of it.
package duty.shift_not_persistent_notice

import data.common
import rego.v2

obligations contains object.union(verdict(later), {
	"key": sprintf("%s/%s", [later.id, trim_prefix(later.shift.ref, "audiogram/")]),
	"facts": {"ears": later.ears},
	"because": common.refs([later.shift, later, later.notice]),
}) if {
	some later in to_be_told
}

verdict(later) := {
	"holds": null,
	"on": later.date,
	"missing": ["whether exposure was within the limit on the day of the later test"],
	"note": found(later),
} if {
	later.below_limit == null
} else := {
	"after": later.date,
	"by": later.notice,
	"note": found(later),
}

found(later) := sprintf("the test of %s no longer shows the shift of %s, and the worker is to be told", [later.date, later.shift.date])

# Above the limit protectors stay compulsory, so the paragraph asks for nothing.
to_be_told := [later | some later in input.lapsed; not later.below_limit == false]

not_owed contains "no later test shows that a shift did not persist" if count(input.lapsed) == 0

not_owed contains "exposure was above the limit on the day of the later test" if {
	count(input.lapsed) > 0
	count(to_be_told) == 0
}
