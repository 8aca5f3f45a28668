# METADATA
# title: Noise meter checked before and after use (guidance)
# description: >-
#   Guidance, not law. A sound level meter or dosemeter is checked with an acoustic calibrator before and after each
#   use.
# custom:
#   cite: HSE L108, measurement of noise (guidance)
#   subject: instrument
#   topic: monitoring
#   severity: minor
#   evidence: [measurement, calibration]
#   remedy: Check the instrument with a calibrator before and after each measurement, and record both readings.
package duty.noise_meter_checked

import data.common
import rego.v2

obligations contains {
	"key": use.id,
	"on": use.date,
	"holds": checked(use),
	"note": said(use),
	"missing": ["which instrument was used, and its checks" | checked(use) == null],
	"because": [use.ref],
} if {
	some use in input.noise_measurements
}

not_owed contains "no noise measurement was made with it" if count(input.noise_measurements) == 0

# Of a measurement that names no instrument of the records nobody can say what was done with it.
checked(use) if {
	count(lacking(use)) == 0
} else := null if {
	input.registered == false
} else := false

lacking(use) := array.concat(
	common.missing(use.check_before_db, "before"),
	common.missing(use.check_after_db, "after"),
)

said(use) := "checked with a calibrator before and after" if {
	count(lacking(use)) == 0
} else := sprintf("no check with a calibrator is on record %s the measurement", [concat(" and ", lacking(use))])
