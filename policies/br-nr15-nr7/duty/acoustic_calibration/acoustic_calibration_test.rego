package duty.acoustic_calibration_test

import data.duty.acoustic_calibration as duty
import rego.v2

in_use := {"from": "2022-02-01", "to": null, "current": true}

audiometer := {
	"kind": "audiometer", "in_use": in_use, "registered": true, "latest_calibration": null,
	"tests": 5, "workers": 4, "deviations": [], "years": [],
}

obligation(i) := o if some o in duty.obligations with input as i

reasons(i) := found if found := duty.not_owed with input as i

test_every_year if {
	o := obligation(audiometer)
	o.every == "acoustic_interval"
	o.by == "calibration.acoustic"
	o.during == in_use
}

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
