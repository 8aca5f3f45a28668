package duty.electrical_calibration_test

import data.duty.electrical_calibration as duty
import rego.v2

in_use := {"from": "2022-02-01", "to": null, "current": true}

audiometer := {
	"kind": "audiometer", "in_use": in_use, "registered": true, "latest_calibration": null,
	"tests": 5, "workers": 4, "deviations": [], "years": [],
}

obligation(i) := o if some o in duty.obligations with input as i

reasons(i) := found if found := duty.not_owed with input as i

test_every_five_years if {
	o := obligation(audiometer)
	o.every == "electrical_interval"
	o.by == "calibration.exhaustive"
	o.touches == "test.use"
}

change(kind, used) := {
	"date": "2024-01-10", "ref": "calibration/c1", "kind": kind, "largest_db": 5,
	"used_before_exhaustive": used, "exhaustive": null,
}

with_change(c) := object.union(audiometer, {"deviations": [c]})

held(i) := found if found := {[o.key, o.holds] | some o in duty.obligations; o.holds in {true, false}} with input as i

test_used_after_a_change if {
	used := {"date": "2024-01-11", "ref": "audiogram/a1"}
	held(with_change(change("acoustic", used))) == {["change/2024-01-10", false]}
	held(object.union(with_change(change("acoustic", used)), {"in_use": null})) == {["change/2024-01-10", false]}
}

test_not_used_after_a_change if {
	held(with_change(change("acoustic", null))) == {["change/2024-01-10", true]}
}

test_change_in_another_check if held(with_change(change("functional", null))) == set()

test_unknown_audiometer if {
	unknown := object.union(audiometer, {"kind": null, "registered": false})
	obligation(unknown).holds == null
	reasons(unknown) == set()
}

test_none_in_use if {
	every change in [{"in_use": null}, {"kind": "dosimeter"}, {"kind": null, "tests": 0}] {
		idle := object.union(audiometer, change)
		not obligation(idle)
		count(reasons(idle)) == 1
	}
}
