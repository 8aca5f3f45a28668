package duty.acoustic_calibration_test

import data.duty.acoustic_calibration
import rego.v2

in_use := {"from": "2022-01-10", "to": null, "current": true}

used := {"date": "2024-03-06", "ref": "audiogram/a7"}

calibrated := {"date": "2024-03-20", "ref": "calibration/A1/acoustic@2024-03-20"}

check(kind, deviation, use) := {
	"date": "2024-03-05", "ref": "calibration/A1/functional@2024-03-05", "kind": kind, "largest_db": deviation,
	"acoustic": calibrated, "used_before_acoustic": use, "exhaustive": null, "used_before_exhaustive": null,
}

audiometer(deviations) := {"kind": "audiometer", "registered": true, "in_use": in_use, "tests": 40, "deviations": deviations}

after_check(deviations) := found if found := {o.holds | some o in acoustic_calibration.obligations; "holds" in object.keys(o)} with input as audiometer(deviations)

reasons(dossier) := found if found := acoustic_calibration.not_owed with input as dossier

test_every_year_from_first_use if {
	some o in acoustic_calibration.obligations with input as audiometer([])
	o.every == "acoustic_interval"
	o.during == in_use
	o.touches == "test.use"
	count(reasons(audiometer([]))) == 0
}

test_deviation_of_ten_and_used if after_check([check("functional", 10, used)]) == {false}

test_deviation_of_ten_and_not_used if after_check([check("functional", 10, null)]) == {true}

test_smaller_deviation if after_check([check("functional", 9.9, used)]) == set()

test_deviation_not_recorded if {
	after_check([check("functional", null, used)]) == {null}
	after_check([check("functional", null, null)]) == {true}
}

test_acoustic_deviations_belong_elsewhere if after_check([check("acoustic", 20, used)]) == set()

unregistered(calibration) := {
	"kind": null, "registered": false, "in_use": in_use, "tests": 40, "workers": 38,
	"deviations": [], "latest_calibration": calibration,
}

test_audiometer_of_which_nothing_is_known if {
	some o in acoustic_calibration.obligations with input as unregistered(null)
	o.holds == null
	o.facts.tests == 40
}

test_unregistered_audiometer_with_calibrations if {
	some o in acoustic_calibration.obligations with input as unregistered({"date": "2024-03-20", "ref": "calibration/A1"})
	o.by == "calibration.acoustic"
}

test_no_audiometer if {
	every dossier in [
		{"kind": "dosimeter", "in_use": in_use, "tests": 0, "deviations": []},
		{"kind": null, "in_use": in_use, "tests": 0, "deviations": []},
		{"kind": "audiometer", "in_use": null, "tests": 0, "deviations": []},
	] {
		count(acoustic_calibration.obligations) == 0 with input as dossier
		count(reasons(dossier)) == 1
	}
}
