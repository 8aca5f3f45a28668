package duty.exposure_determined_test

import data.duty.exposure_determined
import rego.v2

group(suspected, measurements, unknown) := {
	"as_of": "2026-06-30", "suspected_noisy": suspected, "workers": 3, "measurements": measurements, "task_day": null,
	"exposure_unknown": {"lower_reached": unknown, "lower_exceeded": [], "upper_reached": [], "upper_exceeded": [], "limit": []},
}

measured := [{"ref": "measurement/m1", "current": true}, {"ref": "measurement/m0", "current": false}]

open := [{"from": "2024-01-01", "to": null, "reason": "there is no full-shift measurement"}]

holds(dossier) := found if found := {o.holds | some o in exposure_determined.obligations} with input as dossier

reasons(dossier) := found if found := exposure_determined.not_owed with input as dossier

test_known if {
	holds(group(true, measured, [])) == {true}
	some o in exposure_determined.obligations with input as group(true, measured, [])
	o.because == ["measurement/m1"]
	o.note == null
}

test_suspected_and_never_measured if {
	holds(group(true, [], open)) == {false}
	count(reasons(group(true, [], open))) == 0
}

test_nobody_has_said_whether_it_is_noisy if {
	some o in exposure_determined.obligations with input as group(null, [], open)
	o.holds == null
	count(o.missing) == 1
}

test_measured_but_undecided if {
	holds(group(true, measured, open)) == {null}
	holds(object.union(group(false, [], open), {"task_day": {"date": "2024-01-01", "ref": "task/t1"}})) == {null}
	holds(group(false, measured, [{"from": "2024-01-01", "to": null, "reason": null}])) == {null}
}

test_no_noise_expected if {
	holds(group(false, [], open)) == set()
	count(reasons(group(false, [], open))) == 1
}
