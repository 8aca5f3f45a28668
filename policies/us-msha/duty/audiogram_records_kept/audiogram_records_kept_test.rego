package duty.audiogram_records_kept_test

import data.duty.audiogram_records_kept
import rego.v2

audiogram(day) := {"date": day, "ref": sprintf("audiogram/%s", [day])}

lost := {"date": "2024-04-01", "ref": "notice/n1", "id": "a9"}

attended(kind, day) := {"id": "e1", "ref": "examination/e1", "kind": kind, "attended_on": day}

worker(change) := object.union(
	{
		"employed": [{"from": "2020-01-01", "to": null, "current": true}],
		"enrolled": [{"from": "2020-01-01", "to": null, "current": true}],
		"missing_audiograms": [],
		"examinations": [],
		"audiograms": [audiogram("2024-03-05")],
	},
	change,
)

left := {"employed": [{"from": "2020-01-01", "to": "2025-01-01", "current": false}]}

obligation(dossier) := only if {
	all := audiogram_records_kept.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_on_file if {
	obligation(worker({})).holds == true
	obligation(worker({"examinations": [attended("hearing_test", "2024-03-05")]})).holds == true
	obligation(worker({"examinations": [attended("hearing_test", null), attended("health_appointment", "2024-06-01")]})).holds == true
}

test_lost if {
	found := obligation(worker({"missing_audiograms": [lost]}))
	found.holds == false
	found.key == "a9"
	not "for" in object.keys(found)
}

test_lost_of_who_was_hired_again if {
	again := {"employed": [{"from": "2015-01-01", "to": "2018-01-01", "current": false}, {"from": "2020-01-01", "to": null, "current": true}]}
	not "for" in object.keys(obligation(worker(object.union(again, {"missing_audiograms": [lost]}))))
}

test_tested_and_not_on_file if {
	found := obligation(worker({"examinations": [attended("hearing_test", "2024-06-01")]}))
	found.after == "2024-06-01"
	found.within == "results_time"
	found.by == null
	found.note == "the miner was tested on 2024-06-01, and no audiogram of that day is on file"
}

test_kept_for_some_time_after_employment if {
	found := obligation(worker(object.union(left, {"missing_audiograms": [lost]})))
	found.for == "retention"
	found.on == "2025-01-01"
}

test_nothing_lost_of_who_left if {
	audiogram_records_kept.obligations == set() with input as worker(left)
	count(audiogram_records_kept.not_owed) == 1 with input as worker(left)
}

test_lost_and_nothing_else_on_file if {
	alone := worker({"audiograms": [], "missing_audiograms": [lost]})
	obligation(alone).holds == false
	count(audiogram_records_kept.not_owed) == 0 with input as alone
}

test_never_tested if {
	untested := worker({"audiograms": []})
	audiogram_records_kept.obligations == set() with input as untested
	audiogram_records_kept.not_owed == {"the records speak of no audiogram"} with input as untested
	count(audiogram_records_kept.not_owed) == 0 with input as worker({})
}

test_never_in_the_program if {
	outside := worker({"enrolled": [], "missing_audiograms": [lost]})
	audiogram_records_kept.obligations == set() with input as outside
	audiogram_records_kept.not_owed == {"the miner has never been in the program"} with input as outside
}
