package duty.exposure_notice_test

import data.duty.exposure_notice as duty
import rego.v2

worker(notice) := {"results": [{
	"ref": "measurement/m1",
	"id": "m1",
	"date": "2019-11-15",
	"since": "2020-01-01",
	"dose_pct": 75,
	"notice": notice,
}]}

told := {"date": "2020-02-01", "ref": "notice/n1"}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_told if {
	found := obligation(worker(told))
	found.key == "m1"
	found.after == "2020-01-01"
	found.by == told
	found.because == ["measurement/m1", "notice/n1"]
	not "within" in object.keys(found)
}

test_not_told if {
	found := obligation(worker(null))
	found.by == null
	startswith(found.note, "the measurement of ")
}

test_exposure_worked_out_from_tasks if {
	day := {"ref": "task/g1/grinding", "id": null, "date": null, "since": "2020-01-01", "dose_pct": 112.5, "notice": null}
	obligation({"results": [day]}).key == "task/g1/grinding"
}

test_nothing_to_tell if {
	duty.obligations == set() with input as {"results": []}
	duty.not_owed == {"no monitoring result puts the worker into the program"} with input as {"results": []}
	duty.not_owed == set() with input as worker(null)
}
