package duty.means_identified_test

import data.duty.means_identified
import rego.v2

evaluation := {"date": "2024-02-01", "ref": "document/e", "early": false, "ends": "2029-02-01"}

early := {"date": "2022-02-01", "ref": "document/early", "early": true, "ends": "2028-06-16"}

control(feasible, day) := {"date": day, "ref": "control/c", "what": "enclosure", "feasible": feasible}

group(evaluations, controls, choice) := {
	"workers": 12, "exposed": {"limit": [{"from": "2023-06-16", "to": null, "current": true}]},
	"evaluations": evaluations, "controls": controls, "choices": {"early_evaluation": choice},
}

answers(dossier) := found if found := {o.by | some o in means_identified.obligations} with input as dossier

link := {"date": "2024-03-01", "ref": "control/c"}

test_nothing_recorded_is_a_question if {
	answers(group([evaluation], [], "not_counted")) == {null}
	answers(group([evaluation], [control("studied", "2024-03-01")], "not_counted")) == {null}
	count(means_identified.not_owed) == 0 with input as group([evaluation], [], "not_counted")
}

test_finding_answers if {
	every feasible in ["yes", "no"] {
		answers(group([evaluation], [control(feasible, "2024-03-01")], "not_counted")) == {link}
	}
}

test_finding_before_the_evaluation_does_not if answers(group([evaluation], [control("yes", "2024-01-31")], "not_counted")) == {null}

test_early_evaluation_only_if_elected if {
	answers(group([early], [control("yes", "2024-03-01")], "counted")) == {link}
	answers(group([early], [], "not_counted")) == set()
	count(means_identified.not_owed) == 1 with input as group([early], [], "not_counted")
}

test_not_above_now if {
	formerly := object.union(group([evaluation], [], "not_counted"), {"exposed": {"limit": [{"from": "2023-06-16", "to": "2024-03-01", "current": false}]}})
	answers(formerly) == set()
	count(means_identified.not_owed) == 1 with input as formerly
}
