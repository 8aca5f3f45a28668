# METADATA
# title: Electrical calibration of the audiometer
# description: >-
#   The audiometer has an electrical calibration (calibração elétrica) when the acoustic calibration shows a
#   change, when the maker recommends it, and otherwise every five years. In the records it is the exhaustive
#   calibration. What the maker recommends is not in the records.
# custom:
#   cite: NR-7 Annex II item 3.2 II
#   subject: instrument
#   topic: test-quality
#   severity: major
#   evidence: [calibration, instrument, audiogram]
#   remedy: >-
#     Have the audiometer calibrated now, keep the certificate with it, and have a professional look at the exams
#     made meanwhile.
package duty.electrical_calibration

import data.common
import rego.v2

obligations contains {
	"every": "electrical_interval",
	"during": input.in_use,
	"by": "calibration.exhaustive",
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

obligations contains {
	"key": sprintf("change/%s", [check.date]),
	"holds": check.used_before_exhaustive == null,
	"on": check.date,
	"note": said(check),
	"because": common.refs([check, check.used_before_exhaustive, check.exhaustive]),
	"facts": {"largest_deviation_db": check.largest_db},
} if {
	some check in changed
}

not_owed contains "no audiometer in use" if {
	not in_use
	count(changed) == 0
}

# Acoustic calibrations that found a change.
changed := [check | some check in input.deviations; check.kind == "acoustic"]

said(check) := sprintf("the audiometer was used on %s, after the acoustic calibration of %s found a change and before an electrical calibration", [check.used_before_exhaustive.date, check.date]) if {
	check.used_before_exhaustive != null
} else := sprintf("the audiometer was not used between the change found on %s and an electrical calibration", [check.date])

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
