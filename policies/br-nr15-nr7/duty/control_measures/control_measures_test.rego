package duty.control_measures_test

import data.duty.control_measures as duty
import rego.v2

since(day) := {"from": day, "to": null, "current": true}

formerly := {"from": "2020-01-01", "to": "2024-01-01", "current": false}

control(feasible, installed) := {
	"date": "2024-03-05", "ref": "control/press", "what": "enclosure of the press",
	"feasible": feasible, "installed_on": installed,
}

group(exposed, controls) := {
	"workers": 12, "controls": controls, "exposed": {"limit": exposed},
}

holds(g) := found if found := {object.get(o, "holds", "opinion") | some o in duty.obligations} with input as g

above(controls) := group([since("2020-01-01")], controls)

test_nothing_on_record_is_a_question if {
	holds(above([])) == {"opinion"}
	holds(above([control("studied", null)])) == {"opinion"}
	holds(above([control(null, null)])) == {"opinion"}
}

test_not_feasible_or_in_place if {
	holds(above([control("no", null)])) == {true}
	holds(above([control("yes", "2024-05-01")])) == {true}
}

test_feasible_and_not_in_place if {
	holds(above([control("yes", null)])) == {false}
	some o in duty.obligations with input as above([object.union(control("yes", null), {"what": null})])
	o.note == "the measure was found feasible and is not in place: the one of 2024-03-05"
}

test_later_record_on_the_same_measure_counts if {
	holds(above([control("yes", null), control("yes", "2024-05-01")])) == {true}
	other := object.union(control("no", null), {"what": "rotation"})
	holds(above([control("yes", null), other])) == {false}
}

test_not_above_now if {
	holds(group([formerly], [])) == set()
	reasons := duty.not_owed with input as group([formerly], [])
	count(reasons) == 1
}
