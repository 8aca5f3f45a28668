package duty.assessment_recorded_test

import data.duty.assessment_recorded
import rego.v2

measurement := {
	"id": "m1", "date": "2024-03-05", "ref": "measurement/m1", "instrument": "d1",
	"levelled": true, "dosed": false, "max_dba": null,
}

group(changes, more) := object.union(
	{"measurements": [object.union(measurement, changes)], "area": "hall", "task_day": {"date": "2024-03-05", "ref": "task/t"}, "documents": []},
	more,
)

lacks(dossier) := found if found := {o.facts.lacking | some o in assessment_recorded.obligations} with input as dossier

test_complete if {
	lacks(group({}, {})) == {[]}
	lacks(group({"levelled": false, "dosed": true}, {})) == {[]}
	lacks(group({"levelled": false, "max_dba": 90}, {})) == {[]}
	{[o.holds, o.note] | some o in assessment_recorded.obligations} == {[true, null]} with input as group({}, {})
	count(assessment_recorded.not_owed) == 0 with input as group({}, {})
}

test_lacking if {
	lacks(group({"instrument": null, "levelled": false}, {"area": null, "task_day": null})) == {["equipment", "location", "readings", "tasks"]}
	some o in assessment_recorded.obligations with input as group({"instrument": null}, {})
	o.holds == false
	contains(o.note, "equipment")
}

test_tasks_in_a_report if {
	report := {"kind": "noise_measurement_report", "covers": ["tasks"]}
	lacks(group({}, {"task_day": null, "documents": [report]})) == {[]}
	lacks(group({}, {"task_day": null, "documents": [object.union(report, {"kind": "advice"})]})) == {["tasks"]}
	lacks(group({}, {"task_day": null, "documents": [object.union(report, {"covers": []})]})) == {["tasks"]}
}

test_tasks_only_since_2023 if {
	lacks(group({"date": "2023-03-30"}, {"task_day": null})) == {[]}
	lacks(group({"date": "2023-03-31"}, {"task_day": null})) == {["tasks"]}
}

test_never_measured if {
	idle := object.union(group({}, {}), {"measurements": []})
	lacks(idle) == set()
	count(assessment_recorded.not_owed) == 1 with input as idle
}
