package duty.means_started_test

import data.duty.means_started
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

starts(dossier) := found if found := {[o.after, o.by] | some o in means_started.obligations} with input as dossier

test_not_begun if {
	starts(group([evaluation], [], control)) == {["2024-02-01", null]}
	count(means_started.not_owed) == 0 with input as group([evaluation], [], control)
}

test_begun if starts(group([evaluation], [], object.union(control, {"started_on": "2025-02-01"}))) == {["2024-02-01", {"date": "2025-02-01", "ref": "control/c"}]}

test_in_place_without_a_day_of_start if {
	starts(group([evaluation], [], object.union(control, {"installed_on": "2025-02-02"}))) == {["2024-02-01", {"date": "2025-02-02", "ref": "control/c"}]}
}

test_latest_evaluation_counts if {
	earlier := object.union(evaluation, {"date": "2023-09-01"})
	starts(group([earlier, evaluation], [], control)) == {["2024-02-01", null]}
	later := object.union(evaluation, {"date": "2024-03-02"})
	starts(group([evaluation, later], [], control)) == {["2024-02-01", null]}
}

test_early_evaluation if {
	elected := object.union(group([early], [], control), {"choices": {"early_evaluation": "counted"}})
	starts(elected) == {["2023-06-16", null]}
	starts(group([early], [], control)) == {["2024-03-01", null]}
}

test_without_evaluation_its_own_day_counts if starts(group([], [], control)) == {["2024-03-01", null]}

test_before_the_section_nothing_is_owed if {
	old := object.union(control, {"date": "2023-06-15"})
	starts(group([], [], old)) == set()
	count(means_started.not_owed) == 1 with input as group([], [], old)
}

test_change_in_between if {
	every day in ["2024-02-02", "2024-03-01"] {
		starts(group([evaluation], [change(day, "yes")], control)) == set()
		count(means_started.not_owed) == 1 with input as group([evaluation], [change(day, "yes")], control)
	}
	starts(group([evaluation], [change("2024-02-02", "no")], control)) == {["2024-02-01", null]}
	starts(group([evaluation], [change("2024-03-02", "yes")], control)) == {["2024-02-01", null]}
	starts(group([], [change("2024-02-02", "yes")], control)) == set()
}

test_within_the_limits_by_now if {
	kept := object.union(group([evaluation], [], control), over)
	{o.by | some o in means_started.obligations; o.ask} == {null} with input as kept
	starts(kept) == set()
	unknown := object.union(kept, {"exposure_unknown": {"limit": [{"from": "2025-01-08", "to": null, "reason": "not measured since"}]}})
	starts(unknown) == {["2024-02-01", null]}
	begun := object.union(group([evaluation], [], object.union(control, {"started_on": "2025-02-01"})), over)
	starts(begun) == {["2024-02-01", {"date": "2025-02-01", "ref": "control/c"}]}
}

test_never_above_a_limit if {
	quiet := object.union(group([evaluation], [], control), {"exposed": {"limit": []}})
	starts(quiet) == set()
	count(means_started.not_owed) == 1 with input as quiet
}

test_not_reasonable if {
	no := object.union(control, {"feasible": "no"})
	starts(group([evaluation], [], no)) == set()
	count(means_started.not_owed) == 1 with input as group([evaluation], [], no)
}
