package duty.change_assessed_test

import data.duty.change_assessed as duty
import rego.v2

none := {"left": false, "right": false}

left := {"left": true, "right": false}

left_open := {"left": null, "right": false}

still := {"above_acceptable": none, "noise_pattern": none, "high_mean": none, "high_single": none, "low_mean": none, "any_single": none}

exam(id, day, base, schemes) := {
	"id": id, "ref": sprintf("audiogram/%s", [id]), "date": day, "enrolled": true, "invalidated": false,
	"baseline_left": base, "baseline_right": base, "schemes": object.union(still, schemes), "follow_ups": [], "notices": [],
}

reference(schemes) := exam("a1", "2022-02-20", null, schemes)

later(schemes) := exam("a2", "2024-02-20", "audiogram/a1", schemes)

answers(list) := {[o.key, object.get(o, "holds", o.note)] |
	some o in duty.obligations with input as {"audiograms": list} with data.measures.hearing.physicians as ["physician"]
}

triggered := {["a2", "exam of 2024-02-20: left ear suggestive of triggering"]}

worsened := {["a2", "exam of 2024-02-20: left ear suggestive of worsening"]}

pattern := {"above_acceptable": left, "noise_pattern": left}

test_triggering_by_the_mean_or_a_single_frequency if {
	answers([reference({}), later({"high_mean": left})]) == triggered
	answers([reference({}), later({"high_single": left})]) == triggered
	answers([reference({}), later({"high_single": left, "above_acceptable": left, "noise_pattern": left})]) == triggered
}

test_lower_frequencies_do_not_trigger if {
	answers([reference({}), later({"low_mean": left, "any_single": left})]) == {["a2", true]}
}

test_worsening_by_each_of_three if {
	every scheme in ["low_mean", "high_mean", "any_single"] {
		answers([reference(pattern), later({scheme: left})]) == worsened
	}
}

test_reference_altered_in_another_pattern if {
	answers([reference({"above_acceptable": left}), later({"high_mean": left, "any_single": left})]) == {["a2", true]}
}

test_both_ears if {
	both := {"left": true, "right": true}
	answers([reference(pattern), later({"high_mean": both})]) == {["a2", "exam of 2024-02-20: left ear suggestive of worsening; right ear suggestive of triggering"]}
}

test_not_known if {
	answers([reference({"above_acceptable": left_open}), later({"high_mean": left})]) == {["a2", null]}
	answers([reference({}), later({"high_mean": left_open})]) == {["a2", null]}
	answers([reference({"above_acceptable": left, "noise_pattern": left_open}), later({"any_single": left})]) == {["a2", null]}
	answers([later({"high_mean": left})]) == {["a2", null]}
}

test_not_known_does_not_matter_where_the_rest_decides if {
	answers([reference({"above_acceptable": left_open, "noise_pattern": left_open}), later({})]) == {["a2", true]}
	answers([reference({}), later({"high_mean": left_open, "high_single": left})]) == triggered
}

test_shown_again_is_no_new_case if {
	again := exam("a3", "2025-02-20", "audiogram/a1", {"high_mean": left})
	answers([reference({}), later({"high_mean": left}), again]) == triggered | {["a3", null]}
	newest := exam("a4", "2026-02-20", "audiogram/a1", {"high_mean": left})
	answers([reference({}), later({"high_mean": left}), again, newest]) == triggered | {["a3", true], ["a4", null]}
	answers([reference({}), later({"high_mean": left}), exam("a3", "2025-02-20", "audiogram/a1", {})]) == triggered | {["a3", true]}
}

test_new_reference_makes_a_new_case if {
	again := exam("a3", "2025-02-20", "audiogram/a2", {"high_mean": left})
	found := answers([reference({}), later({"high_mean": left}), again])
	found == triggered | {["a3", "exam of 2025-02-20: left ear suggestive of triggering"]}
}

opinion(by) := {"date": "2024-03-01", "ref": "follow_up/f1", "kind": "medical_opinion", "by_is": by}

asked(follow_ups) := o if {
	some o in duty.obligations with input as {"audiograms": [reference({}), object.union(later({"high_mean": left}), {"follow_ups": follow_ups})]}
		with data.measures.hearing.physicians as ["physician"]
}

test_answered_by_a_physician_only if {
	asked([opinion("physician")]).by == {"date": "2024-03-01", "ref": "follow_up/f1"}
	asked([opinion("audiologist"), object.union(opinion("physician"), {"kind": "referral"})]).by == null
}

test_no_sequential_exam if {
	every change in [{"enrolled": false}, {"invalidated": true}] {
		list := [reference({}), object.union(later({"high_mean": left}), change)]
		answers(list) == set()
		reasons := duty.not_owed with input as {"audiograms": list}
		count(reasons) == 1
	}
}
