package duty.noise_evaluated_test

import data.duty.noise_evaluated as duty
import rego.v2

group(suspected, survey, measurements) := {
	"first_survey": survey, "suspected_noisy": suspected, "impulsive": null,
	"workers": 4, "measurements": measurements,
}

holds(g) := found if found := {o.holds | some o in duty.obligations} with input as g

reasons(g) := found if found := duty.not_owed with input as g

test_measured if {
	holds(group(true, {"date": "2024-01-10", "ref": "measurement/m1"}, [{}])) == {true}
	reasons(group(true, {"date": "2024-01-10", "ref": "measurement/m1"}, [{}])) == set()
}

test_suspected_and_never_measured if {
	holds(group(true, null, [])) == {false}
	holds(object.union(group(false, null, []), {"impulsive": true})) == {false}
	reasons(object.union(group(false, null, []), {"impulsive": true})) == set()
}

test_measured_without_a_dose if holds(group(true, null, [{}])) == {null}

test_nobody_has_said if holds(group(null, null, [])) == {null}

test_nothing_suggests_noise if {
	holds(group(false, null, [])) == set()
	reasons(group(false, null, [])) == {"nothing suggests noise"}
}
