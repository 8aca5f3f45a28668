# METADATA
# title: Workers told of their exposure
# description: >-
#   Above the action level workers are informed (information of the workers, part of the preventive systematic
#   control). The text sets neither a form nor a time for it; a record of each measurement that puts the worker
#   above the action level is asked for.
# custom:
#   cite: NR-9 9.6.1 c (from memory)
#   subject: worker
#   topic: information
#   severity: minor
#   evidence: [notice, measurement]
#   remedy: >-
#     Tell the worker the result of the noise measurement and what it means, and keep a record of it.
package duty.exposure_information

import data.common
import rego.v2

obligations contains {
	"key": name(result),
	"after": result.since,
	"by": result.notice,
	"note": "the result puts the worker above the action level, who is to be told of it",
	"facts": {"dose_pct": result.dose_pct, "measured_on": result.date},
	"because": common.refs([result, result.notice]),
} if {
	some result in input.results
}

# An exposure worked out from tasks has no measurement id.
name(result) := result.id if {
	result.id != null
} else := result.ref

not_owed contains "no result puts the worker above the action level" if count(input.results) == 0
