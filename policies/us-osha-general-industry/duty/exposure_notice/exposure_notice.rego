# METADATA
# title: Told of the noise measurement
# description: >-
#   The employer notifies each employee who is exposed at or above the action level of the results of the monitoring. The
#   text sets neither a form nor a time for it.
# custom:
#   cite: 29 CFR 1910.95(e)
#   subject: worker
#   topic: notice
#   severity: major
#   evidence: [notice, measurement]
#   remedy: Tell the worker the result of the noise measurement, and keep a record of it.
package duty.exposure_notice

import data.common
import rego.v2

obligations contains {
	"key": name(result),
	"after": result.since,
	"by": result.notice,
	"note": said(result),
	"facts": {"dose_pct": result.dose_pct, "measured_on": result.date},
	"because": common.refs([result, result.notice]),
} if {
	some result in input.results
}

said(result) := sprintf("the measurement of %s puts the worker into the program, who is to be told the result", [result.date]) if {
	result.date != null
} else := "the exposure worked out from tasks puts the worker into the program, who is to be told the result"

# An exposure worked out from tasks has no measurement id.
name(result) := result.id if {
	result.id != null
} else := result.ref

not_owed contains "no monitoring result puts the worker into the program" if count(input.results) == 0
