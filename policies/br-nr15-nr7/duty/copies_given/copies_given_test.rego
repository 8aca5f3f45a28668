package duty.copies_given_test

import data.duty.copies_given as duty
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

told(about) := {"date": "2024-03-01", "ref": "notice/n1", "about": about}

test_not_given if {
	obligation(case([], [])).by == null
	obligation(case([], [told("quiet_period")])).by == null
}

test_given if {
	every about in ["result", "abnormal_result", "shift"] {
		obligation(case([], [told(about)])).by == {"date": "2024-03-01", "ref": "notice/n1"}
	}
}

test_no_case if {
	count(reasons([])) == 1
	count(reasons([case([], [])])) == 0
}
