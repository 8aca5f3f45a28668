# METADATA
# title: Yearly calibration of the audiometer (guidance)
# description: >-
#   Guidance, not law. The audiometer is calibrated objectively every year.
# custom:
#   cite: HSE L108, audiometers (guidance)
#   subject: instrument
#   topic: test-quality
#   severity: minor
#   evidence: [calibration, audiogram]
#   remedy: Have the audiometer calibrated, and let the occupational-health professional look at the tests made since it was due.
package duty.audiometer_calibrated

import rego.v2

obligations contains {
	"every": "audiometer_interval",
	"during": input.in_use,
	"by": "calibration.acoustic",
	"touches": "test.use",
} if {
	owed
}

not_owed contains "no hearing test was made with it" if not owed

owed if {
	input.tests > 0
	input.in_use != null
}
