package duty.noise_instrument_calibrated_test

import data.duty.noise_instrument_calibrated
import rego.v2

calibration := {"date": "2024-01-10", "ref": "calibration/D1/laboratory@2024-01-10"}

unchecked := {
	"id": "m1", "ref": "measurement/m1", "date": "2024-03-05",
	"check_before_db": null, "check_after_db": null, "calibrated": null, "calibration_failed": false,
}

dosimeter(changes) := {"kind": "dosimeter", "registered": true, "noise_measurements": [object.union(unchecked, changes)]}

holds(dossier) := found if found := {o.holds | some o in noise_instrument_calibrated.obligations} with input as dossier

test_neither_checked_nor_calibrated if holds(dosimeter({})) == {false}

test_checked_before_and_after if holds(dosimeter({"check_before_db": 114, "check_after_db": 114.1})) == {true}

test_calibrated if {
	some o in noise_instrument_calibrated.obligations with input as dosimeter({"calibrated": calibration})
	o.holds == true
	o.because == ["measurement/m1", "calibration/D1/laboratory@2024-01-10"]
}

test_failed_calibration_outweighs_checks if {
	holds(dosimeter({"calibrated": calibration, "calibration_failed": true, "check_before_db": 114, "check_after_db": 114})) == {false}
}

test_one_check_only if {
	some o in noise_instrument_calibrated.obligations with input as dosimeter({"check_before_db": 114})
	o.holds == null
	o.missing == ["the calibrator check after the measurement"]
}

test_unregistered if {
	unregistered := {"kind": null, "registered": false}
	holds(object.union(dosimeter({}), unregistered)) == {null}
	holds(object.union(dosimeter({"check_before_db": 114, "check_after_db": 114}), unregistered)) == {true}
}

test_says_how_many_measurements_it_touches if {
	meter := {"kind": "sound_level_meter", "registered": true, "noise_measurements": [unchecked, object.union(unchecked, {"id": "m2"})]}
	{o.facts.measurements_with_it | some o in noise_instrument_calibrated.obligations} == {2} with input as meter
	{o.key | some o in noise_instrument_calibrated.obligations} == {"m1", "m2"} with input as meter
}

test_not_for_audiometers if {
	audiometer := object.union(dosimeter({}), {"kind": "audiometer"})
	holds(audiometer) == set()
	count(noise_instrument_calibrated.not_owed) == 1 with input as audiometer
}

test_not_used if {
	unused := {"kind": "calibrator", "registered": true, "noise_measurements": []}
	holds(unused) == set()
	count(noise_instrument_calibrated.not_owed) == 1 with input as unused
	count(noise_instrument_calibrated.not_owed) == 0 with input as dosimeter({})
}

test_use_before_the_section if {
	old := dosimeter({"date": "2023-06-15"})
	holds(old) == set()
	count(noise_instrument_calibrated.not_owed) == 1 with input as old
}
