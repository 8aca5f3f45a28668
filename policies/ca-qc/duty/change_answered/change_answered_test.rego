package duty.change_answered_test

import data.duty.change_answered
import rego.v2

change := {
	"id": "c1", "ref": "change/c1", "date": "2025-03-01", "what": "a third line", "raises_exposure": "yes",
	"identified_on": null, "enrolling": false, "measured": null, "period_ends": null, "period_short": null,
}

measurement := {"date": "2026-03-01", "ref": "measurement/m1"}

control := {"ref": "control/c", "started_on": "2026-02-01", "installed_on": null}

group(changes, measurements, controls) := {
	"changes": [object.union(change, changes)], "suspected_noisy": true, "exposure_unknown": {"limit": []},
	"measurements": measurements, "controls": controls,
}

answers(dossier) := found if found := {o.by | some o in change_answered.obligations} with input as dossier

test_nothing_done if {
	answers(group({}, [], [])) == {null}
	count(change_answered.not_owed) == 0 with input as group({}, [], [])
}

test_measured if answers(group({}, [measurement], [])) == {{"date": "2026-03-01", "ref": "measurement/m1"}}

test_means_begun if answers(group({}, [measurement], [control])) == {{"date": "2026-02-01", "ref": "control/c"}}

test_only_its_end_is_recorded if {
	answers(group({}, [], [{"ref": "control/c", "started_on": null, "installed_on": "2025-09-01"}])) == {{"date": "2025-09-01", "ref": "control/c"}}
	answers(group({}, [], [{"ref": "control/c", "started_on": null, "installed_on": null}])) == {null}
}

test_what_was_done_before_does_not_count if {
	old := object.union(control, {"started_on": "2025-02-28"})
	answers(group({}, [{"date": "2025-02-28", "ref": "measurement/m0"}], [old])) == {null}
	answers(group({}, [], [object.union(old, {"installed_on": "2025-03-05"})])) == {null}
	answers(group({}, [{"date": "2025-03-01", "ref": "measurement/m0"}], [])) == {{"date": "2025-03-01", "ref": "measurement/m0"}}
}

test_identified_but_not_said_to_raise if answers(group({"raises_exposure": null, "identified_on": "2025-03-02"}, [], [])) == {null}

test_not_owed if {
	answers(group({"raises_exposure": null}, [], [])) == set()
	count(change_answered.not_owed) == 1 with input as group({"raises_exposure": null}, [], [])
	unsaid := object.union(group({}, [], []), {"suspected_noisy": null})
	count(change_answered.not_owed) == 1 with input as unsaid
	count(change_answered.not_owed) == 1 with input as object.union(unsaid, {"changes": [object.union(change, {"measured": measurement})]})
	quiet := object.union(group({}, [], []), {"suspected_noisy": false})
	count(change_answered.not_owed) == 1 with input as quiet
	answers(object.union(quiet, {"changes": [object.union(change, {"enrolling": true})]})) == {null}
}
