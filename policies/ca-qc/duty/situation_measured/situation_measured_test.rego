package duty.situation_measured_test

import data.duty.situation_measured
import rego.v2

survey := {"date": "2024-03-05", "ref": "measurement/m1"}

sample := {"id": "m2", "date": "2024-02-05", "ref": "measurement/m2"}

group(changes) := object.union(
	{
		"as_of": "2026-06-30", "suspected_noisy": true, "first_survey": null, "workers": 3,
		"measurements": [], "exposure_unknown": {"limit": []},
	},
	changes,
)

unknown := {"limit": [{"from": "2023-06-16", "to": null, "reason": "taken with 5 dB exchange"}]}

formerly := {"limit": [{"from": "2019-01-01", "to": "2023-06-16", "reason": "not measured"}]}

holds(dossier) := found if found := {o.holds | some o in situation_measured.obligations} with input as dossier

test_measured if {
	holds(group({"first_survey": survey})) == {true}
	holds(group({"first_survey": survey, "exposure_unknown": formerly})) == {true}
	count(situation_measured.not_owed) == 0 with input as group({"first_survey": survey})
}

test_measured_on_another_scale if {
	holds(group({"measurements": [sample], "exposure_unknown": unknown})) == {null}
	holds(group({"first_survey": survey, "exposure_unknown": unknown})) == {null}
}

# A level known only within bounds that lie on one side of the limit is known.
test_bounds_decide if holds(group({"measurements": [sample]})) == {true}

test_never_measured if {
	holds(group({"exposure_unknown": unknown})) == {false}
	holds(group({"suspected_noisy": null})) == {null}
}

test_nothing_suspected if {
	holds(group({"suspected_noisy": false})) == set()
	count(situation_measured.not_owed) == 1 with input as group({"suspected_noisy": false})
}

test_not_in_force_yet if {
	every suspected in [true, null] {
		dossier := group({"as_of": "2023-06-15", "suspected_noisy": suspected})
		holds(dossier) == set()
		count(situation_measured.not_owed) == 1 with input as dossier
	}
}
