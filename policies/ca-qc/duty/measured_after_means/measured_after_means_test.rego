package duty.measured_after_means_test

import data.duty.measured_after_means
import rego.v2

control := {"ref": "control/c", "what": "enclosure", "installed_on": "2025-05-01"}

group(control, measurements) := {
	"controls": [control], "measurements": measurements,
	"suspected_noisy": true, "exposed": {"limit": []},
}

answers(dossier) := found if found := {o.by | some o in measured_after_means.obligations} with input as dossier

test_not_measured_since if {
	answers(group(control, [])) == {null}
	answers(group(control, [{"date": "2025-04-30", "ref": "measurement/m1"}])) == {null}
	count(measured_after_means.not_owed) == 0 with input as group(control, [])
}

test_measured_on_the_day if answers(group(control, [{"date": "2025-05-01", "ref": "measurement/m1"}])) == {{"date": "2025-05-01", "ref": "measurement/m1"}}

test_two_means_of_one_day_are_one_matter if {
	two := {"suspected_noisy": null, "exposed": {"limit": [{"from": "2023-06-16", "to": "2025-05-01", "current": false}]}, "controls": [control, object.union(control, {"what": "silencers", "ref": "control/d"})], "measurements": []}
	{[o.key, o.because] | some o in measured_after_means.obligations} == {["2025-05-01", ["control/c", "control/d"]]} with input as two
}

test_quiet_situation if {
	quiet := object.union(group(control, []), {"suspected_noisy": false})
	answers(quiet) == set()
	count(measured_after_means.not_owed) == 1 with input as quiet
}

test_not_owed if {
	every day in [null, "2023-06-15"] {
		answers(group(object.union(control, {"installed_on": day}), [])) == set()
		count(measured_after_means.not_owed) == 1 with input as group(object.union(control, {"installed_on": day}), [])
	}
}
