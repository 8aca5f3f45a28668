# METADATA
# title: Notice of exposure
# description: >-
#   When the operator's or MSHA's evaluation shows an exposure at or above the action level, above the permissible
#   exposure level or above the dual hearing protection level, the operator notifies the miner of it in writing within
#   15 calendar days of the determination. No notice is owed if the miner was notified of an exposure at that level
#   within the prior 12 months.
# custom:
#   cite: 30 CFR 62.110(d)
#   subject: worker
#   topic: notice
#   severity: major
#   evidence: [notice, measurement]
#   remedy: Notify the miner in writing of the exposure and of the corrective action, and keep a dated copy.
package duty.exposure_notice

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

obligations contains {
	"key": name(result),
	"within": "notice_time",
	"after": result.since,
	"by": in_writing(result),
	"note": said(result),
	"facts": {"dose_pct": result.dose_pct, "levels": result.levels},
	"because": common.refs([result, result.notice]),
} if {
	some result in input.results
	result.told_before == null
	not unclear(result)
}

obligations contains {
	"key": name(result),
	"holds": null,
	"note": sprintf("the miner was told on %s, but it is not known whether in writing", [result.notice.date]),
	"missing": ["whether the notice was in writing"],
	"because": common.refs([result, result.notice]),
} if {
	some result in input.results
	result.told_before == null
	unclear(result)
}

unclear(result) if {
	result.notice != null
	result.written == null
}

in_writing(result) := result.notice if {
	result.written == true
} else := null

said(result) := sprintf("the miner was told of the exposure on %s, but not in writing", [result.notice.date]) if {
	result.written == false
} else := sprintf("the exposure concerns the miner since %s, and a written notice is owed", [result.since])

# An exposure worked out from tasks has no measurement id.
name(result) := result.id if {
	result.id != null
} else := result.ref

not_owed contains "no evaluation shows an exposure at or above the action level" if count(input.results) == 0
