package duty.accident_communication_test

import data.duty.accident_communication as duty
import rego.v2

done(kind, result, by, day) := {"date": day, "ref": sprintf("follow_up/%s@%s", [kind, day]), "kind": kind, "result": result, "ear": "left", "by_is": by}

case(follow_ups, notices) := {
	"id": "a2", "ref": "audiogram/a2", "date": "2024-02-20", "ears": ["left"], "words": "left ear suggestive of triggering",
	"follow_ups": follow_ups, "notices": notices,
}

obligation(c) := only if {
	found := duty.obligations with data.duty.change_assessed.cases as [c] with data.measures.hearing.physicians as ["physician"]
	count(found) == 1
	some only in found
}

reasons(list) := found if found := duty.not_owed with data.duty.change_assessed.cases as list with data.measures.hearing.physicians as ["physician"]

confirmed := done("medical_opinion", "work_related", "physician", "2024-03-01")

test_not_issued if {
	o := obligation(case([confirmed], []))
	o.after == "2024-03-01"
	o.within == "cat_time"
	o.by == null
	o.because == ["audiogram/a2", "follow_up/medical_opinion@2024-03-01"]
}

test_issued if {
	obligation(case([confirmed, done("authority_report", null, null, "2024-03-04")], [])).by.date == "2024-03-04"
}

test_not_confirmed if {
	count(reasons([case([], [])])) == 1
	count(reasons([case([object.union(confirmed, {"by_is": "audiologist"})], [])])) == 1
	count(reasons([case([object.union(confirmed, {"result": "not_work_related"})], [])])) == 1
	count(reasons([case([confirmed], [])])) == 0
}
