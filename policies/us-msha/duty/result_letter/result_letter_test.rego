package duty.result_letter_test

import data.duty.result_letter
import rego.v2

told(about, day, written) := {"date": day, "ref": sprintf("notice/%s", [day]), "about": about, "written": written}

evaluated := {"date": "2024-05-02", "ref": "follow_up/1", "kind": "evaluation_results"}

worker(change) := {"audiograms": [object.union(
	{
		"id": "a2",
		"ref": "audiogram/a2",
		"date": "2024-03-05",
		"received_on": "2024-03-12",
		"enrolled": true,
		"in_program": true,
		"invalidated": false,
		"notices": [],
		"follow_ups": [],
	},
	change,
)]}

by_key(dossier) := found if found := {o.key: o | some o in result_letter.obligations} with input as dossier

test_written if {
	every about in ["result", "abnormal_result", "shift"] {
		found := by_key(worker({"notices": [told(about, "2024-03-20", true)]})).a2
		found.by == {"date": "2024-03-20", "ref": "notice/2024-03-20"}
		found.after == "2024-03-12"
		found.within == "result_letter_time"
		found.because == ["audiogram/a2", "notice/2024-03-20"]
	}
}

test_not_written if {
	by_key(worker({})).a2.by == null
	by_key(worker({"notices": [told("quiet_period", "2024-03-20", true)]})).a2.by == null
	found := by_key(worker({"notices": [told("result", "2024-03-20", false)]})).a2
	found.by == null
	endswith(found.note, "of which the miner was told, but not in writing")
}

test_not_known_whether_in_writing if {
	unclear := by_key(worker({"notices": [told("result", "2024-03-20", null)]})).a2
	unclear.holds == null
	unclear.note == "the result of the audiogram of 2024-03-05 was received on 2024-03-12"
	by_key(worker({"notices": [told("result", "2024-03-20", null), told("result", "2024-03-21", true)]})).a2.by.date == "2024-03-21"
}

test_invalid_audiograms_count if by_key(worker({"in_program": false, "invalidated": true})).a2.by == null

test_follow_up_evaluation if {
	found := by_key(worker({"follow_ups": [evaluated], "notices": [told("result", "2024-03-20", true)]}))
	found.a2.by.date == "2024-03-20"
	found["a2/evaluation"].by == null
	found["a2/evaluation"].after == "2024-05-02"
	later := by_key(worker({"follow_ups": [evaluated], "notices": [told("result", "2024-05-06", true)]}))
	later["a2/evaluation"].by.date == "2024-05-06"
	later["a2/evaluation"].because == ["audiogram/a2", "follow_up/1", "notice/2024-05-06"]
}

test_nothing_received if {
	every change in [{"received_on": null}, {"in_program": false}, {"in_program": false, "invalidated": true, "enrolled": false}] {
		by_key(worker(change)) == {}
		count(result_letter.not_owed) == 1 with input as worker(change)
	}
	count(result_letter.not_owed) == 0 with input as worker({})
	count(result_letter.not_owed) == 0 with input as worker({"received_on": null, "follow_ups": [evaluated]})
}
