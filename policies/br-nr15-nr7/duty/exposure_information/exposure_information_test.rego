package duty.exposure_information_test

import data.duty.exposure_information as duty
import rego.v2

result(id, notice) := {
	"id": id, "ref": "measurement/m1", "date": "2024-01-10", "since": "2024-02-01", "dose_pct": 75, "notice": notice,
}

told := {"date": "2024-02-05", "ref": "notice/n1"}

worker(results) := {"results": results}

test_told if {
	some o in duty.obligations with input as worker([result("m1", told)])
	o.key == "m1"
	o.after == "2024-02-01"
	o.by == told
	o.because == ["measurement/m1", "notice/n1"]
}

test_not_told if {
	some o in duty.obligations with input as worker([result(null, null)])
	o.key == "measurement/m1"
	o.by == null
}

test_no_result if {
	found := duty.obligations with input as worker([])
	count(found) == 0
	reasons := duty.not_owed with input as worker([])
	count(reasons) == 1
}
