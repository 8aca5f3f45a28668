# METADATA
# title: Acoustic calibration of the audiometer
# description: >-
#   The audiometer has an acoustic calibration (calibração acústica) every year by ISO 8253-1, with a certificate
#   that goes with it.
# custom:
#   cite: NR-7 Annex II items 3.2 I and 3.2.1
#   subject: instrument
#   topic: test-quality
#   severity: major
#   evidence: [calibration, instrument, audiogram]
#   remedy: >-
#     Have the audiometer calibrated now, keep the certificate with it, and have a professional look at the exams
#     made meanwhile.
package duty.acoustic_calibration

import rego.v2

obligations contains {
	"every": "acoustic_interval",
	"during": input.in_use,
	"by": "calibration.acoustic",
	"touches": "test.use",
} if {
	in_use
	not unknown_audiometer
}

obligations contains {
	"holds": null,
	"note": "exams were made with an audiometer of which there is neither a record nor a calibration",
	"missing": ["which audiometer was used, and its calibrations"],
	"facts": {"exams": input.tests, "workers_tested": input.workers},
} if {
	in_use
	unknown_audiometer
}

not_owed contains "no audiometer in use" if not in_use

unknown_audiometer if {
	input.registered == false
	input.latest_calibration == null
}

in_use if {
	is_audiometer
	input.in_use != null
}

is_audiometer if input.kind == "audiometer"

is_audiometer if {
	input.kind == null
	input.tests > 0
}
