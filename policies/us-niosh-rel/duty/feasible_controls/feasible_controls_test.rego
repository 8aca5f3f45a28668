package duty.feasible_controls_test

import data.duty.feasible_controls
import rego.v2

above := {"rel": [{"from": "2020-01-01", "to": null, "current": true}]}

formerly_above := {"rel": [{"from": "2020-01-01", "to": "2024-01-01", "current": false}]}

never := {"rel": []}

control(feasible, installed) := {
	"date": "2024-03-05", "ref": "control/press", "what": "enclosure of the press",
	"feasible": feasible, "installed_on": installed,
}

group(exposed, controls) := {
	"as_of": "2026-06-30", "workers": 12, "controls": controls,
	"exposed": exposed, "exposure_unknown": {"rel": []},
	"first_survey": {"date": "2020-01-01", "ref": "measurement/m1"},
}

not_known(from, to) := object.union(group(never, []), {"exposure_unknown": {"rel": [{"from": from, "to": to, "reason": "not measured"}]}})

holds(dossier) := found if found := {object.get(o, "holds", "opinion") | some o in feasible_controls.obligations} with input as dossier

reasons(dossier) := found if found := feasible_controls.not_owed with input as dossier

test_no_control_on_record_is_a_question if {
	some o in feasible_controls.obligations with input as group(above, [])
	o.of == "competent person (engineering)"
	count(reasons(group(above, []))) == 0
}

test_study_without_finding_is_a_question if {
	holds(group(above, [control("studied", null)])) == {"opinion"}
	holds(group(above, [control(null, null)])) == {"opinion"}
}

test_found_not_feasible if holds(group(above, [control("no", null)])) == {true}

test_feasible_and_in_place if holds(group(above, [control("yes", "2024-05-01")])) == {true}

test_feasible_and_not_in_place if holds(group(above, [control("yes", null)])) == {false}

test_latest_record_counts if holds(group(above, [control("yes", null), control("no", null)])) == {true}

test_another_control_does_not_replace_one_that_is_owed if {
	other := object.union(control("no", null), {"what": "rotation"})
	holds(group(above, [control("yes", null), other])) == {false}
	holds(group(above, [control("yes", "2024-05-01"), other])) == {true}
	holds(group(above, [object.union(control("yes", null), {"what": null}), other])) == {false}
	holds(group(above, [control("yes", null), control("yes", "2024-05-01")])) == {true}
}

test_below_the_rel_now if {
	every exposed in [never, formerly_above] {
		holds(group(exposed, [control("yes", null)])) == set()
		count(reasons(group(exposed, []))) == 1
	}
}

test_not_known_whether_above if {
	some o in feasible_controls.obligations with input as not_known("2025-01-01", null)
	o.holds == null
	contains(o.note, "not measured")
	count(o.missing) == 1
	count(reasons(not_known("2025-01-01", null))) == 0
}

test_never_measured_is_not_this_matter if {
	unmeasured := object.union(not_known("2025-01-01", null), {"first_survey": null})
	holds(unmeasured) == set()
	count(reasons(unmeasured)) == 1
}

test_not_known_formerly_is_over if {
	holds(not_known("2024-01-01", "2026-06-30")) == set()
	count(reasons(not_known("2024-01-01", "2026-06-30"))) == 1
	holds(not_known("2024-01-01", "2026-07-01")) == {null}
}
