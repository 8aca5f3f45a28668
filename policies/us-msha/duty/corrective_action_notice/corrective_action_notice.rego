# METADATA
# title: Notice of the corrective action
# description: >-
#   The written notice of an exposure also tells the miner what corrective action is being taken. The text says within
#   15 calendar days of both; this bundle reads both as contents of one notice, whose time begins with the
#   determination, and shows a corrective action that is told later. It is owed in the same cases as the notice of
#   exposure.
# custom:
#   cite: 30 CFR 62.110(d)
#   subject: worker
#   topic: notice
#   severity: minor
#   evidence: [notice, measurement]
#   remedy: Tell the miner in writing what is being done about the exposure, and record the notice as one about corrective_action.
package duty.corrective_action_notice

import data.common
import rego.v2

obligations contains {
	"key": name(result),
	"lifted": sprintf("the miner was notified of an exposure at the same level on %s", [result.told_before.date]),
	"cite": "30 CFR 62.110(d)",
	"because": common.refs([result, result.told_before]),
} if {
	some result in input.results
	result.told_before != null
}

obligations contains object.union(verdict(result), {"key": name(result)}) if {
	some result in input.results
	result.told_before == null
}

verdict(result) := {
	"within": "notice_time",
	"after": result.since,
	"by": {"date": in_writing(result)[0].date, "ref": in_writing(result)[0].ref},
	"because": [result.ref],
} if {
	count(in_writing(result)) > 0
} else := {
	"holds": null,
	"note": "the miner was told of the corrective action, but it is not known whether in writing",
	"missing": ["whether the notice was in writing"],
	"because": [result.ref],
} if {
	some told in since(result)
	told.written == null
} else := {
	"within": "notice_time",
	"after": result.since,
	"by": null,
	"note": sprintf("the exposure concerns the miner since %s, and no written notice of the corrective action is on record", [result.since]),
	"because": [result.ref],
}

since(result) := [told |
	some told in input.told_of_exposure
	told.about == "corrective_action"
	told.date >= result.date
]

in_writing(result) := [told | some told in since(result); told.written == true]

# An exposure worked out from tasks has no measurement id and no day.
name(result) := result.id if {
	result.id != null
} else := result.ref

not_owed contains "no evaluation shows an exposure at or above the action level" if count(input.results) == 0
