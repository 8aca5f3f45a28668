package duty.quiet_period_notice_test

import data.duty.quiet_period_notice as duty
import rego.v2

worker(change) := {"baseline": object.union(
	{
		"date": "2024-02-01",
		"ref": "audiogram/a1",
		"quiet_notice": null,
		"late_quiet_notice": null,
		"in_program": true,
	},
	change,
)}

early := {"date": "2024-01-20", "ref": "notice/n1"}

late := {"date": "2024-02-02", "ref": "notice/n2"}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_told_in_time if {
	found := obligation(worker({"quiet_notice": early, "late_quiet_notice": late}))
	found.holds == true
	found.because == ["audiogram/a1", "notice/n1", "notice/n2"]
}

test_told_too_late if {
	found := obligation(worker({"late_quiet_notice": late}))
	found.holds == false
	found.note == "the miner was told only after the test"
}

test_no_notice_on_record if {
	found := obligation(worker({}))
	found.holds == false
	found.note == "no notice to avoid loud noise before the test is on record"
	found.because == ["audiogram/a1"]
}

test_no_baseline if {
	duty.obligations == set() with input as {"baseline": null}
	duty.not_owed == {"there is no baseline yet"} with input as {"baseline": null}
}

test_never_in_the_program if {
	duty.obligations == set() with input as worker({"in_program": false})
	duty.not_owed == {"the miner has never been in the program"} with input as worker({"in_program": false})
}

test_baseline_from_before_the_law_began if {
	duty.obligations == set() with input as worker({"date": "2000-09-12"})
	duty.not_owed == {"the baseline is from before the law began"} with input as worker({"date": "2000-09-12"})
	obligation(worker({"date": "2000-09-13"})).holds == false
}
