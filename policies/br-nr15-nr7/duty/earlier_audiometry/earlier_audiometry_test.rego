package duty.earlier_audiometry_test

import data.duty.earlier_audiometry as duty
import rego.v2

stretch := {"from": "2024-01-01", "to": null, "current": true}

examination(attended, next_due) := {
	"id": "e1", "ref": "examination/e1", "kind": "hearing_test",
	"attended_on": attended, "next_due": next_due,
}

audiogram(day) := {"date": day, "ref": "audiogram/a2", "invalidated": false, "ears_with_result": 2}

worker(examinations, audiograms) := {"enrolled": [stretch], "examinations": examinations, "audiograms": audiograms}

obligation(w) := o if some o in duty.obligations with input as w

test_exam_by_the_day if {
	o := obligation(worker([examination("2024-05-02", "2024-11-02")], [audiogram("2024-05-02"), audiogram("2024-11-03")]))
	o.no_later_than == "2024-11-02"
	o.within == "audiogram_interval"
	o.after == "2024-05-02"
	o.by == {"date": "2024-11-03", "ref": "audiogram/a2"}
	o.key == "e1"
}

test_no_exam_since if {
	invalid := object.union(audiogram("2024-06-01"), {"invalidated": true})
	empty := object.union(audiogram("2024-06-01"), {"ears_with_result": 0})
	obligation(worker([examination("2024-05-02", "2024-11-02")], [invalid, empty])).by == null
}

test_outcome_only_exam_counts if {
	second := object.union(examination("2024-10-01", null), {"ref": "examination/e2"})
	appointment := object.union(second, {"kind": "health_appointment", "attended_on": "2024-09-01"})
	missed := object.union(second, {"attended_on": null})
	obligation(worker([examination("2024-05-02", "2024-11-02"), second, appointment, missed], [])).by.date == "2024-10-01"
}

test_no_day_set if {
	every list in [[], [examination("2024-05-02", null)], [examination(null, "2024-11-02")], [object.union(examination("2024-05-02", "2024-11-02"), {"kind": "health_appointment"})], [examination("2023-12-31", "2024-11-02")]] {
		found := duty.obligations with input as worker(list, [])
		count(found) == 0
		reasons := duty.not_owed with input as worker(list, [])
		count(reasons) == 1
	}
}
