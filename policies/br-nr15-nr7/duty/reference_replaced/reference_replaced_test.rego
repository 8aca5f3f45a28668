package duty.reference_replaced_test

import data.duty.reference_replaced as duty
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

revised(ear) := object.union(done("baseline_revision", null, "physician", "2024-03-01"), {"ear": ear})

test_not_replaced if {
	obligation(case([], [])).by == null
	obligation(case([], [])).key == "a2/left"
	obligation(case([revised("right"), done("referral", null, "physician", "2024-03-01")], [])).by == null
}

test_replaced if {
	every ear in ["left", "both", null] {
		obligation(case([revised(ear)], [])).by.date == "2024-03-01"
	}
}

test_each_ear if {
	two := object.union(case([revised("left")], []), {"ears": ["left", "right"]})
	found := {[o.key, is_null(o.by)] | some o in duty.obligations} with data.duty.change_assessed.cases as [two]
	found == {["a2/left", false], ["a2/right", true]}
}

test_no_case if {
	count(reasons([])) == 1
	count(reasons([case([], [])])) == 0
}
