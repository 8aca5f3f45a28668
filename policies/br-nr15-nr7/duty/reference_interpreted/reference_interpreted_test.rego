package duty.reference_interpreted_test

import data.duty.reference_interpreted as duty
import rego.v2

ears(left, right) := {"left": left, "right": right}

exam(above, pattern, follow_ups) := {
	"id": "a1", "ref": "audiogram/a1", "date": "2024-02-20", "follow_ups": follow_ups,
	"schemes": {"above_acceptable": above, "noise_pattern": pattern},
}

worker(e) := {"baseline": {"ref": "audiogram/a1", "in_program": true}, "audiograms": [e]}

obligation(e) := only if {
	found := duty.obligations with input as worker(e) with data.measures.hearing.physicians as ["physician"]
	count(found) == 1
	some only in found
}

opinion(kind, by) := {"date": "2024-03-01", "ref": "follow_up/f1", "kind": kind, "by_is": by}

altered(follow_ups) := exam(ears(true, false), ears(true, false), follow_ups)

test_within_limits if {
	obligation(exam(ears(false, false), ears(false, false), [])).holds == true
}

test_pattern_is_a_question if {
	o := obligation(altered([]))
	o.of == "occupational physician"
	o.by == null
	o.note == "reference exam of 2024-02-20: left ear suggestive of PAINPSE"
}

test_other_pattern_is_a_question if {
	obligation(exam(ears(true, true), ears(false, null), [])).note == concat("", [
		"reference exam of 2024-02-20: left ear altered, not in the pattern of PAINPSE; ",
		"right ear altered, and the thresholds do not show in which pattern",
	])
}

test_answered_by_a_physician_only if {
	obligation(altered([opinion("medical_opinion", "physician")])).by == {"date": "2024-03-01", "ref": "follow_up/f1"}
	obligation(altered([opinion("medical_opinion", "audiologist"), opinion("referral", "physician")])).by == null
}

test_cannot_be_told if obligation(exam(ears(false, null), ears(false, false), [])).holds == null

test_one_ear_altered_the_other_not_known if {
	obligation(exam(ears(true, null), ears(true, null), [])).ask != null
}

test_reference_exam_from_before_the_rule if {
	old := object.union(altered([]), {"date": "1998-04-21"})
	found := duty.obligations with input as worker(old)
	count(found) == 0
	obligation(object.union(altered([]), {"date": "1998-04-22"})).ask != null
}

test_no_reference_exam if {
	every dossier in [
		{"baseline": null, "audiograms": []},
		object.union(worker(altered([])), {"baseline": {"in_program": false}}),
	] {
		found := duty.obligations with input as dossier
		count(found) == 0
		reasons := duty.not_owed with input as dossier
		count(reasons) == 1
	}
}
