package duty.noise_assessed_test

import data.duty.noise_assessed
import rego.v2

survey := {"date": "2024-03-05", "ref": "measurement/m1"}

group(changes) := object.union(
	{
		"as_of": "2026-06-30", "suspected_noisy": true, "first_survey": null, "workers": 3,
		"measurements": [], "exposure_unknown": {"assessment": []},
	},
	changes,
)

unknown := {"assessment": [{"from": "2023-03-31", "to": null, "reason": "taken with 5 dB exchange"}]}

holds(dossier) := found if found := {o.holds | some o in noise_assessed.obligations} with input as dossier

test_measured if {
	holds(group({"first_survey": survey})) == {true}
	count(noise_assessed.not_owed) == 0 with input as group({"first_survey": survey})
}

test_measured_on_another_scale if {
	holds(group({"measurements": [{"id": "m1"}], "exposure_unknown": unknown})) == {null}
	holds(group({"first_survey": survey, "exposure_unknown": unknown})) == {null}
}

test_never_measured if {
	holds(group({"exposure_unknown": unknown})) == {false}
	holds(group({"suspected_noisy": null})) == {null}
}

test_nothing_suspected if {
	holds(group({"suspected_noisy": false})) == set()
	count(noise_assessed.not_owed) == 1 with input as group({"suspected_noisy": false})
}
