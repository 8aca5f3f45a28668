# METADATA
# title: Log book of the audiometer
# description: >-
#   Each audiometer has a log book with written calibration records, which stays with it for its useful life. A
#   calibration on record shows that there is one; the law sets no interval here.
# custom:
#   cite: OHS Code, s. 223(2)(b)
#   subject: instrument
#   topic: test-quality
#   severity: minor
#   evidence: [calibration, audiogram, instrument]
#   remedy: Find or make the log book of the audiometer, and enter its calibrations.
package duty.audiometer_log

import data.common
import rego.v2

obligations contains {
	"holds": input.latest_calibration != null,
	"note": note,
	"because": common.refs([input.latest_calibration]),
	"facts": {"tests": input.tests, "workers": input.workers},
} if {
	used
}

not_owed contains "no hearing test was made with it" if not used

used if input.tests > 0

note := "no calibration of the audiometer is on record" if {
	input.latest_calibration == null
} else := null
