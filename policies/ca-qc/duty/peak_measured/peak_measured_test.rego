package duty.peak_measured_test

import data.duty.peak_measured
import rego.v2

survey := {"date": "2024-03-05", "ref": "measurement/m1"}

group(impulsive, measurements) := {"first_survey": survey, "impulsive": impulsive, "workers": 3, "measurements": measurements}

peak := {"date": "2024-03-05", "ref": "measurement/m1", "current": true, "peak_dbc": 136}

holds(dossier) := found if found := {o.holds | some o in peak_measured.obligations} with input as dossier

test_peak_on_record if {
	holds(group(true, [peak])) == {true}
	holds(group(null, [peak])) == {true}
	count(peak_measured.not_owed) == 0 with input as group(true, [peak])
}

test_impulses_without_peak if {
	holds(group(true, [])) == {false}
	holds(group(true, [object.union(peak, {"peak_dbc": null})])) == {false}
	holds(group(true, [object.union(peak, {"current": false})])) == {false}
}

test_nobody_has_said if holds(group(null, [])) == {null}

test_a_sample_is_enough if {
	sampled := object.union(group(true, [object.union(peak, {"peak_dbc": null})]), {"first_survey": null})
	holds(sampled) == {false}
}

test_not_owed if {
	holds(group(false, [])) == set()
	unmeasured := object.union(group(true, []), {"first_survey": null})
	holds(unmeasured) == set()
	count(peak_measured.not_owed) == 1 with input as unmeasured
	count(peak_measured.not_owed) == 1 with input as group(false, [])
}
