package duty.corrective_action_notice_test

import data.duty.corrective_action_notice
import rego.v2

result := {
	"ref": "measurement/m1",
	"id": "m1",
	"date": "2024-03-01",
	"since": "2024-03-01",
	"told_before": null,
}

told(about, day, written) := {"date": day, "ref": "notice/n1", "about": about, "written": written}

worker(change, notices) := {"results": [object.union(result, change)], "told_of_exposure": notices}

obligation(dossier) := only if {
	all := corrective_action_notice.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_told_in_writing if {
	found := obligation(worker({}, [told("corrective_action", "2024-03-10", true)]))
	found.by == {"date": "2024-03-10", "ref": "notice/n1"}
	found.after == "2024-03-01"
	found.within == "notice_time"
}

test_not_told if {
	every notices in [
		[],
		[told("exposure", "2024-03-10", true)],
		[told("corrective_action", "2024-02-29", true)],
		[told("corrective_action", "2024-03-10", false)],
	] {
		obligation(worker({}, notices)).by == null
	}
}

test_not_known_whether_in_writing if obligation(worker({}, [told("corrective_action", "2024-03-10", null)])).holds == null

test_told_of_that_level_before if {
	before := {"told_before": {"date": "2023-06-01", "ref": "notice/n0"}}
	obligation(worker(before, [])).cite == "30 CFR 62.110(d)"
}

test_exposure_worked_out_from_tasks if obligation(worker({"id": null, "ref": "task/g1/cutting"}, [])).key == "task/g1/cutting"

test_nothing_to_tell if {
	quiet := {"results": [], "told_of_exposure": []}
	corrective_action_notice.obligations == set() with input as quiet
	count(corrective_action_notice.not_owed) == 1 with input as quiet
	count(corrective_action_notice.not_owed) == 0 with input as worker({}, [])
}
