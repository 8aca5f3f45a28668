package duty.removal_and_referral_test

import data.duty.removal_and_referral as duty
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

test_not_answered if {
	o := obligation(case([confirmed], []))
	o.of == "occupational physician"
	o.by == null
	o.on == "2024-03-01"
}

test_answered if {
	every kind in ["referral_decision", "referral", "alternative_work"] {
		obligation(case([confirmed, done(kind, null, "physician", "2024-03-01")], [])).by.date == "2024-03-01"
	}
}

test_not_confirmed if {
	count(reasons([case([done("medical_opinion", null, "physician", "2024-03-01")], [])])) == 1
	count(reasons([case([object.union(confirmed, {"by_is": null})], [])])) == 1
	count(reasons([case([confirmed], [])])) == 0
}
