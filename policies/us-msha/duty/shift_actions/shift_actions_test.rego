package duty.shift_actions_test

import data.duty.shift_actions
import rego.v2

shift := {
	"date": "2024-03-05",
	"ref": "audiogram/a2",
	"id": "a2",
	"first_test": {"date": "2024-03-05", "ref": "audiogram/a2"},
	"ears": "left",
	"age_corrected": false,
	"retraining": null,
	"not_work_related": null,
	"other_opinion": null,
	"hearing": {"left_db": 12},
}

done(kind, day) := {"date": day, "ref": sprintf("follow_up/%s", [kind]), "kind": kind}

tested(id, day, received, follow_ups) := {
	"id": id,
	"ref": sprintf("audiogram/%s", [id]),
	"date": day,
	"received_on": received,
	"follow_ups": follow_ups,
}

stretch := {"from": "2020-01-01", "to": null, "current": true}

worker(change, tests) := {"enrolled": [stretch], "shifts": [object.union(shift, change)], "audiograms": tests, "revisions": []}

one(received, follow_ups) := [tested("a2", "2024-03-05", received, follow_ups)]

by_key(dossier) := found if found := {o.key: o | some o in shift_actions.obligations} with input as dossier

test_nothing_done if {
	found := by_key(worker({}, one("2024-03-10", [])))
	object.keys(found) == {"a2/retraining", "a2/choice", "a2/controls"}
	every key, o in found {
		o.key == key
		o.by == null
		o.after == "2024-03-10"
		o.within == "shift_action_time"
		o.during == {"from": "2020-01-01", "to": null}
	}
	found["a2/choice"].note == "after the shift of 2024-03-05 the miner is to choose a protector, or a different one"
}

test_all_done if {
	retrained := {"date": "2024-03-20", "ref": "training/1"}
	follow_ups := [done("protector_choice", "2024-03-21"), done("controls_reviewed", "2024-03-22")]
	found := by_key(worker({"retraining": retrained}, one("2024-03-10", follow_ups)))
	found["a2/retraining"].by == retrained
	found["a2/choice"].by == {"date": "2024-03-21", "ref": "follow_up/protector_choice"}
	found["a2/controls"].by == {"date": "2024-03-22", "ref": "follow_up/controls_reviewed"}
}

test_result_not_received if {
	found := by_key(worker({}, one(null, [])))
	found["a2/choice"].after == null
	found["a2/choice"].missing == ["the day on which the result was received"]
	by_key(worker({}, []))["a2/choice"].after == null
}

test_confirmed_by_a_retest if {
	change := {"id": "a3", "ref": "audiogram/a3", "date": "2024-04-02"}
	tests := [
		tested("a2", "2024-03-05", "2024-03-10", [done("controls_reviewed", "2024-03-22")]),
		tested("a3", "2024-04-02", "2024-04-12", [done("protector_choice", "2024-04-20")]),
	]
	found := by_key(worker(change, tests))
	found["a3/controls"].after == "2024-04-12"
	found["a3/controls"].by.date == "2024-03-22"
	found["a3/choice"].by.date == "2024-04-20"
}

test_not_work_related if {
	found := by_key(worker({"not_work_related": {"date": "2024-03-12", "ref": "follow_up/9"}}, one("2024-03-10", [])))
	object.keys(found) == {"a2"}
	found.a2.cite == "30 CFR 62.174"
	found.a2.because == ["audiogram/a2", "follow_up/9"]
}

test_made_outside_the_program if {
	outside := object.union(worker({}, one("2024-03-10", [])), {"enrolled": []})
	by_key(outside)["a2/choice"].during == null
}

revised(result) := object.union(worker({}, one("2024-03-10", [])), {"revisions": [{"audiogram": "audiogram/a2", "result": result}]})

test_new_baseline_after_an_absence_shows_no_shift if {
	by_key(revised("new_baseline")) == {}
	count(shift_actions.not_owed) == 1 with input as revised("new_baseline")
	count(by_key(revised("persistent"))) == 3
}

test_no_shift if {
	quiet := {"enrolled": [stretch], "shifts": [], "audiograms": [], "revisions": []}
	by_key(quiet) == {}
	count(shift_actions.not_owed) == 1 with input as quiet
	count(shift_actions.not_owed) == 0 with input as worker({}, one("2024-03-10", []))
}
