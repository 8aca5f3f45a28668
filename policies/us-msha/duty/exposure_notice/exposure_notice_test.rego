package duty.exposure_notice_test

import data.duty.exposure_notice
import rego.v2

notice := {"date": "2024-03-10", "ref": "notice/n1"}

worker(change) := {"results": [object.union(
	{
		"ref": "measurement/m1",
		"id": "m1",
		"date": "2024-03-01",
		"since": "2024-03-01",
		"dose_pct": 75,
		"levels": ["action"],
		"notice": null,
		"written": null,
		"told_before": null,
	},
	change,
)]}

obligation(dossier) := only if {
	all := exposure_notice.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_told_in_writing if {
	found := obligation(worker({"notice": notice, "written": true}))
	found.within == "notice_time"
	found.after == "2024-03-01"
	found.by == notice
	found.key == "m1"
	found.because == ["measurement/m1", "notice/n1"]
}

test_not_told if {
	found := obligation(worker({}))
	found.by == null
	found.note == "the exposure concerns the miner since 2024-03-01, and a written notice is owed"
}

test_told_but_not_in_writing if {
	found := obligation(worker({"notice": notice, "written": false}))
	found.by == null
	found.note == "the miner was told of the exposure on 2024-03-10, but not in writing"
}

test_not_known_whether_in_writing if {
	found := obligation(worker({"notice": notice}))
	found.holds == null
	found.missing == ["whether the notice was in writing"]
}

test_told_of_that_level_before if {
	found := obligation(worker({"told_before": {"date": "2023-06-01", "ref": "notice/n0"}}))
	found.lifted == "the miner was notified of an exposure at the same level on 2023-06-01"
	found.cite == "30 CFR 62.110(d)"
	found.because == ["measurement/m1", "notice/n0"]
}

test_exposure_worked_out_from_tasks if obligation(worker({"id": null, "ref": "task/g1/cutting"})).key == "task/g1/cutting"

test_nothing_to_tell if {
	exposure_notice.obligations == set() with input as {"results": []}
	count(exposure_notice.not_owed) == 1 with input as {"results": []}
	count(exposure_notice.not_owed) == 0 with input as worker({})
}
