# METADATA
# title: Calibrated noise instruments
# description: >-
#   Measurements are made with a calibrated instrument of a suitable class. The section was not read; from memory. A
#   check with a calibrator before and after the measurement, or a calibration on or before its day that was not
#   failed, shows it.
# custom:
#   cite: r. 13, ss. 141.1 to 141.3
#   subject: instrument
#   topic: monitoring
#   severity: minor
#   evidence: [measurement, calibration, instrument]
#   remedy: Check the instrument with a calibrator before and after each measurement and record both readings; measure again what was measured without.
package duty.noise_instrument_calibrated

import data.common
import rego.v2

obligations contains {
	"key": use.id,
	"on": use.date,
	"holds": finding.holds,
	"note": sprintf("measurement of %s: %s", [use.date, finding.note]),
	"missing": finding.missing,
	"because": array.concat([use.ref], common.refs([use.calibrated])),
	"facts": {"measurements_with_it": count(uses)},
} if {
	not is_audiometer
	some use in uses
	finding := calibration_of(use)
}

not_owed contains "an audiometer, not an instrument for noise" if is_audiometer

not_owed contains "no noise measurement was made with it since the section came into force" if {
	not is_audiometer
	count(uses) == 0
}

is_audiometer if input.kind == "audiometer"

uses := [use |
	some use in input.noise_measurements
	common.at(data.parameters.sections_in_force, use.date) != null
]

# The first of these that fits.
calibration_of(use) := {"holds": false, "note": "the instrument had failed its latest calibration", "missing": []} if {
	use.calibration_failed == true
} else := {"holds": true, "note": "the instrument was calibrated or checked with a calibrator", "missing": []} if {
	shown_accurate(use)
} else := {"holds": null, "note": "only one check with a calibrator is on record", "missing": checks_lacking(use)} if {
	count(checks_lacking(use)) == 1
} else := {"holds": null, "note": "the instrument is not in the instrument records", "missing": ["the instrument and its calibrations"]} if {
	input.registered == false
} else := {"holds": false, "note": "neither a calibration nor a check with a calibrator is on record", "missing": []}

shown_accurate(use) if use.calibrated != null

shown_accurate(use) if count(checks_lacking(use)) == 0

checks_lacking(use) := array.concat(
	common.missing(use.check_before_db, "the calibrator check before the measurement"),
	common.missing(use.check_after_db, "the calibrator check after the measurement"),
)
