package duty.exhaustive_calibration_test

import data.duty.exhaustive_calibration
import rego.v2

in_use := {"from": "2022-01-10", "to": null, "current": true}

used := {"date": "2024-03-06", "ref": "audiogram/a7"}

check(kind, deviation, use) := {
	"date": "2024-03-05", "ref": "calibration/A1/acoustic@2024-03-05", "kind": kind, "largest_db": deviation,
	"acoustic": null, "used_before_acoustic": null, "exhaustive": null, "used_before_exhaustive": use,
}

audiometer(deviations) := {"kind": "audiometer", "registered": true, "in_use": in_use, "tests": 40, "deviations": deviations}

after_check(deviations) := found if found := {o.holds | some o in exhaustive_calibration.obligations; "holds" in object.keys(o)} with input as audiometer(deviations)

reasons(dossier) := found if found := exhaustive_calibration.not_owed with input as dossier

test_every_two_years_from_first_use if {
	some o in exhaustive_calibration.obligations with input as audiometer([])
	o.every == "exhaustive_interval"
	o.by == "calibration.exhaustive"
	count(reasons(audiometer([]))) == 0
}

test_deviation_of_fifteen_and_used if after_check([check("acoustic", 15, used)]) == {false}

test_deviation_of_fifteen_and_not_used if after_check([check("acoustic", 15, null)]) == {true}

test_smaller_deviation if after_check([check("acoustic", 14.9, used)]) == set()

test_deviation_not_recorded if {
	after_check([check("acoustic", null, used)]) == {null}
	after_check([check("acoustic", null, null)]) == {true}
}

test_functional_deviations_belong_elsewhere if after_check([check("functional", 20, used)]) == set()

unregistered(calibration) := {
	"kind": null, "registered": false, "in_use": in_use, "tests": 40, "workers": 38,
	"deviations": [], "latest_calibration": calibration,
}

test_audiometer_of_which_nothing_is_known if {
	some o in exhaustive_calibration.obligations with input as unregistered(null)
	o.holds == null
	o.facts.tests == 40
}

test_unregistered_audiometer_with_calibrations if {
	some o in exhaustive_calibration.obligations with input as unregistered({"date": "2024-03-20", "ref": "calibration/A1"})
	o.by == "calibration.exhaustive"
}

test_no_audiometer if {
	every dossier in [
		{"kind": "dosimeter", "in_use": in_use, "tests": 0, "deviations": []},
		{"kind": "audiometer", "in_use": null, "tests": 0, "deviations": []},
	] {
		count(exhaustive_calibration.obligations) == 0 with input as dossier
		count(reasons(dossier)) == 1
	}
}
