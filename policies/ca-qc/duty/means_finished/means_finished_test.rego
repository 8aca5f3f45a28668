package duty.means_finished_test

import data.duty.means_finished
import rego.v2

evaluation := {"date": "2024-02-01", "ref": "document/e", "early": false, "ends": "2029-02-01"}

early := {"date": "2022-02-01", "ref": "document/early", "early": true, "ends": "2028-06-16"}

control := {
	"date": "2024-03-01", "ref": "control/c", "what": "enclosure", "feasible": "yes",
	"started_on": null, "installed_on": null,
}

group(evaluations, changes, control) := {
	"evaluations": evaluations, "changes": changes, "controls": [control], "choices": {"early_evaluation": "not_counted"},
	"as_of": "2026-06-30", "exposed": {"limit": [{"from": "2023-06-16", "to": null, "current": true}]}, "exposure_unknown": {"limit": []},
}

over := {"exposed": {"limit": [{"from": "2023-06-16", "to": "2025-01-08", "current": false}]}}

change(day, raises) := {"id": "x", "date": day, "ref": "change/x", "raises_exposure": raises}

ends(dossier) := found if found := {[o.before, o.by] | some o in means_finished.obligations} with input as dossier

test_not_in_place if {
	ends(group([evaluation], [], control)) == {["2029-02-01", null]}
	count(means_finished.not_owed) == 0 with input as group([evaluation], [], control)
}

test_in_place if ends(group([evaluation], [], object.union(control, {"installed_on": "2025-02-02"}))) == {["2029-02-01", {"date": "2025-02-02", "ref": "control/c"}]}

test_latest_evaluation_before_it_counts if {
	later := object.union(evaluation, {"date": "2024-03-02"})
	ends(group([evaluation, later], [], control)) == {["2029-02-01", null]}
	ends(group([object.union(evaluation, {"date": "2023-09-01", "ends": "2024-02-01"}), evaluation], [], control)) == {["2029-02-01", null]}
}

test_early_evaluation_if_elected if {
	elected := object.union(group([early], [], control), {"choices": {"early_evaluation": "counted"}})
	ends(elected) == {["2028-06-16", null]}
	ends(group([early], [], control)) == set()
}

test_change_in_between if {
	ends(group([evaluation], [change("2024-02-02", "yes")], control)) == set()
	count(means_finished.not_owed) == 1 with input as group([evaluation], [change("2024-02-02", "yes")], control)
	ends(group([evaluation], [change("2024-02-02", "no")], control)) == {["2029-02-01", null]}
	ends(group([evaluation], [change("2024-03-02", "yes")], control)) == {["2029-02-01", null]}
	ends(group([evaluation], [change("2024-02-01", "yes")], control)) == {["2029-02-01", null]}
}

test_within_the_limits_by_now if {
	kept := object.union(group([evaluation], [], control), over)
	ends(kept) == set()
	count(means_finished.not_owed) == 1 with input as kept
	unknown := object.union(kept, {"exposure_unknown": {"limit": [{"from": "2025-01-08", "to": null, "reason": "not measured since"}]}})
	ends(unknown) == {["2029-02-01", null]}
	begun := object.union(group([evaluation], [], object.union(control, {"started_on": "2025-02-01"})), over)
	ends(begun) == {["2029-02-01", null]}
}

test_never_above_a_limit if {
	quiet := object.union(group([evaluation], [], control), {"exposed": {"limit": []}})
	ends(quiet) == set()
	count(means_finished.not_owed) == 1 with input as quiet
}

test_not_reasonable if {
	ends(group([evaluation], [], object.union(control, {"feasible": "studied"}))) == set()
	ends(group([], [], control)) == set()
	count(means_finished.not_owed) == 1 with input as group([], [], control)
}
