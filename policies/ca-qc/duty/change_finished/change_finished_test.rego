package duty.change_finished_test

import data.duty.change_finished
import rego.v2

change := {
	"id": "c1", "ref": "change/c1", "date": "2025-03-01", "what": "a third line", "raises_exposure": "yes",
	"identified_on": null, "enrolling": false, "measured": null, "period_ends": null, "period_short": null,
}

evaluation := {"date": "2023-06-16", "ref": "document/e", "early": false, "ends": "2028-06-16"}

control := {"date": "2025-05-01", "ref": "control/c", "what": "enclosure", "feasible": "yes", "started_on": null, "installed_on": null}

long := object.union(change, {"period_ends": "2028-06-16", "period_short": false})

short := object.union(change, {"period_ends": "2028-06-16", "period_short": true})

group(changes, evaluations, control) := {
	"changes": changes, "suspected_noisy": true, "evaluations": evaluations,
	"controls": [control], "choices": {"early_evaluation": "not_counted"},
}

found(dossier) := list if list := {object.remove(o, ["key", "note", "because", "facts"]) | some o in change_finished.obligations} with input as dossier

test_long_period if {
	found(group([long], [evaluation], control)) == {{"before": "2028-06-16", "by": null}}
	count(change_finished.not_owed) == 0 with input as group([long], [evaluation], control)
}

test_short_period if found(group([short], [evaluation], control)) == {{"after": "2025-03-01", "within": "change_finish_time", "by": null}}

test_in_place if {
	done := object.union(control, {"installed_on": "2026-01-01"})
	found(group([long], [evaluation], done)) == {{"before": "2028-06-16", "by": {"date": "2026-01-01", "ref": "control/c"}}}
}

test_no_period if {
	{o.holds | some o in change_finished.obligations} == {null} with input as group([change], [], control)
	early := object.union(evaluation, {"early": true, "date": "2022-01-01"})
	{o.holds | some o in change_finished.obligations} == {null} with input as group([long], [early], control)
	elected := object.union(group([long], [early], control), {"choices": {"early_evaluation": "counted"}})
	found(elected) == {{"before": "2028-06-16", "by": null}}
}

test_taken_over_by_an_evaluation_or_another_change if {
	again := object.union(evaluation, {"date": "2025-04-01"})
	found(group([long], [evaluation, again], control)) == set()
	count(change_finished.not_owed) == 1 with input as group([long], [evaluation, again], control)
	other := object.union(short, {"id": "c2", "ref": "change/c2", "date": "2025-04-01"})
	keys := {o.key | some o in change_finished.obligations} with input as group([long, other], [evaluation], control)
	keys == {"c2/enclosure"}
}

test_no_means_chosen if {
	found(group([long], [evaluation], object.union(control, {"feasible": "no"}))) == set()
	found(group([long], [evaluation], object.union(control, {"date": "2025-02-28"}))) == set()
	count(change_finished.not_owed) == 1 with input as group([], [evaluation], control)
}

test_measured_since_and_within_the_limits if {
	unsaid := object.union(group([long], [evaluation], control), {"suspected_noisy": null, "exposure_unknown": {"limit": []}})
	found(unsaid) == {{"before": "2028-06-16", "by": null}}
	quiet := object.union(unsaid, {"changes": [object.union(long, {"measured": {"date": "2025-04-01", "ref": "measurement/m"}})]})
	found(quiet) == set()
	count(change_finished.not_owed) == 1 with input as quiet
}

test_only_where_there_is_a_risk if {
	quiet := object.union(group([long], [evaluation], control), {"suspected_noisy": false})
	found(quiet) == set()
	found(object.union(quiet, {"changes": [object.union(long, {"enrolling": true})]})) == {{"before": "2028-06-16", "by": null}}
}
