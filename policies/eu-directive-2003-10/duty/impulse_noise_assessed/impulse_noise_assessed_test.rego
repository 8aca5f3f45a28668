package duty.impulse_noise_assessed_test

import data.duty.impulse_noise_assessed
import rego.v2

group(impulsive, measurements) := {"suspected_noisy": true, "impulsive": impulsive, "measurements": measurements}

peak(dbc) := {"date": "2024-01-10", "ref": "measurement/m1", "current": true, "peak_dbc": dbc}

holds(dossier) := found if found := {o.holds | some o in impulse_noise_assessed.obligations} with input as dossier

reasons(dossier) := found if found := impulse_noise_assessed.not_owed with input as dossier

test_peak_on_record if {
	some o in impulse_noise_assessed.obligations with input as group(true, [peak(131), peak(134), peak(null)])
	o.holds == true
	o.facts.highest_peak_dbc == 134
	holds(group(null, [peak(131)])) == {true}
}

test_impulses_without_peak if {
	some o in impulse_noise_assessed.obligations with input as group(true, [peak(null)])
	o.holds == false
	contains(o.note, "the noise holds impulses")
	o.facts.highest_peak_dbc == null
}

test_measured_again_without_peak if {
	holds(group(true, [object.union(peak(131), {"current": false}), peak(null)])) == {false}
}

test_nobody_has_said if {
	some o in impulse_noise_assessed.obligations with input as group(null, [peak(null)])
	o.holds == null
	contains(o.note, "does not say that it needs none")
	count(o.missing) == 1
	count(reasons(group(null, []))) == 0
}

test_no_impulses if {
	holds(group(false, [peak(null)])) == set()
	count(reasons(group(false, [peak(null)]))) == 1
}

test_no_noise_expected if {
	quiet := object.union(group(null, []), {"suspected_noisy": false})
	holds(quiet) == set()
	count(reasons(quiet)) == 1
}
