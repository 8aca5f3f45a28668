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
	not unknown_audiometer
}

obligations contains {
	"holds": null,
	"note": "tests were made with an audiometer of which there is neither a record nor a calibration",
	"missing": ["which audiometer was used, and its calibrations"],
	"facts": {"tests": input.tests},
} if {
	owed
	unknown_audiometer
}

not_owed contains "no hearing test was made with it" if not owed

owed if {
	input.tests > 0
	input.in_use != null
}

unknown_audiometer if {
	input.registered == false
	input.latest_calibration == null
}
