package duty.action_plan_test

import data.duty.action_plan as duty
import rego.v2

since(day) := {"from": day, "to": null, "current": true}

formerly := {"from": "2020-01-01", "to": "2024-01-01", "current": false}

measures := {"values": [{"from": "1994-12-29", "to": null, "value": ["monitoring", "information", "medical_control"]}]}

group(exposed, documents) := {"as_of": "2026-06-30", "exposed": {"action": exposed}, "workers": 3, "documents": documents}

plan(covers) := {"date": "2024-01-10", "ref": "document/d1", "kind": "control_programme", "covers": covers}

holds(g) := found if found := {o.holds | some o in duty.obligations} with input as g with data.parameters.action_measures as measures

above(documents) := group([since("2024-01-10")], documents)

test_no_plan if {
	holds(above([])) == {false}
	holds(above([object.union(plan([]), {"kind": "zone_signs"})])) == {false}
}

test_plan_without_content if holds(above([plan([])])) == {null}

test_plan_lacks_something if {
	holds(above([plan(["monitoring", "information"])])) == {false}
	some o in duty.obligations with input as above([plan(["monitoring"])]) with data.parameters.action_measures as measures
	o.note == "the action plan lacks: information, medical control"
}

test_two_plans_together if holds(above([plan(["monitoring", "information"]), plan(["medical_control"])])) == {true}

test_not_above if {
	holds(group([formerly], [])) == set()
	reasons := duty.not_owed with input as group([formerly], [])
	count(reasons) == 1
}
