# METADATA
# title: Calibration records kept (recommended)
# description: >-
#   Records of the calibration of audiometers and of instruments for noise are kept for five years. An instrument in use
#   without any calibration on record has none that could be kept.
# custom:
#   cite: NIOSH 98-126, 1.10 (from memory)
#   subject: instrument
#   topic: records
#   severity: minor
#   evidence: [calibration, instrument, audiogram, measurement]
#   remedy: >-
#     Find the calibration record and file it; have the instrument calibrated if there is none.
package duty.calibration_records_kept

import data.common
import rego.v2

obligations contains {
	"holds": input.latest_calibration != null,
	"on": last_use,
	"for": "calibration_record_retention",
	"note": said,
	"because": common.refs([input.latest_calibration]),
	"facts": {"kind": input.kind, "hearing_tests": input.tests, "noise_measurements": count(input.noise_measurements)},
} if {
	count(uses) > 0
}

said := "no calibration of the instrument is on record" if {
	input.latest_calibration == null
} else := sprintf("the latest calibration on record is of %s", [input.latest_calibration.date])

uses := array.concat([year.last | some year in input.years], [use.date | some use in input.noise_measurements])

last_use := max(uses)

not_owed contains "no use of the instrument is on record" if count(uses) == 0
