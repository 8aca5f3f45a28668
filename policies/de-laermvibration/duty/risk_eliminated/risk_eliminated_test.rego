package duty.risk_eliminated_test

import data.duty.risk_eliminated
import rego.v2

group(controls, documents) := {
	"workers": 3, "controls": controls, "documents": documents,
	"exposed": {"lower_reached": [{"from": "2024-01-01", "to": null, "current": true}]},
}

control(feasible, what, installed) := {"date": "2024-02-01", "ref": "control/k1", "feasible": feasible, "what": what, "installed_on": installed}

holds(dossier) := found if found := {o.holds | some o in risk_eliminated.obligations; o.key == "considered"} with input as dossier

done(dossier) := found if found := {o.by | some o in risk_eliminated.obligations; o.key == "control/k1"} with input as dossier

test_nothing_considered if {
	holds(group([], [])) == {false}
	holds(group([], [{"kind": "advice", "ref": "document/d2"}])) == {false}
	count(risk_eliminated.not_owed) == 0 with input as group([], [])
}

test_considered if {
	some o in risk_eliminated.obligations with input as group([control("studied", "enclosure", null)], [])
	o.note == null
	holds(group([control("studied", "enclosure", null)], [])) == {true}
	holds(group([], [{"kind": "means_register", "ref": "document/d1"}])) == {true}
	done(group([control("studied", "enclosure", null), control("no", null, null)], [])) == set()
}

test_feasible_and_not_in_place if {
	done(group([control("yes", "enclosure", null)], [])) == {null}
	some o in risk_eliminated.obligations with input as group([control("yes", null, null)], [])
	o.note == "found feasible: a measure against noise"
}

test_in_place if done(group([control("yes", "enclosure", "2024-06-01")], [])) == {{"date": "2024-06-01", "ref": "control/k1"}}

test_below_the_lower_values if {
	quiet := object.union(group([control("yes", "enclosure", null)], []), {"exposed": {"lower_reached": [{"from": "2023-01-01", "to": "2024-01-01", "current": false}]}})
	found := risk_eliminated.obligations with input as quiet
	count(found) == 0
	count(risk_eliminated.not_owed) == 1 with input as quiet
}
