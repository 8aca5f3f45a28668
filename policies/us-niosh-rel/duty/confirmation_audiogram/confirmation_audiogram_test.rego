package duty.confirmation_audiogram_test

import data.duty.confirmation_audiogram as duty
import rego.v2

test(id, date, left, change) := object.union(
	{
		"id": id, "ref": concat("/", ["audiogram", id]), "date": date, "enrolled": true, "invalidated": false, "purpose": "periodic",
		"retest_of": null, "to_compare": true, "cannot_compare": [], "quiet_hours": 12, "hearing": null,
		"schemes": {"one_test": {"left": left, "right": false}},
	},
	change,
)

first := test("a1", "2024-03-01", true, {})

second := test("a2", "2024-03-31", true, {"purpose": "retest", "retest_of": "audiogram/a1"})

worker(tests, shifts) := {"audiograms": tests, "shifts": shifts}

confirmed := [{"ref": "audiogram/a2", "confirms": {"date": "2024-03-01", "ref": "audiogram/a1"}}]

by_key(w) := found if found := {o.key: o | some o in duty.obligations} with input as w

test_no_second_test if {
	found := by_key(worker([first], []))
	object.keys(found) == {"a1"}
	found.a1.after == "2024-03-01"
	found.a1.within == "confirmation_time"
	found.a1.by == null
}

test_second_test_handed_over_with_its_quiet if {
	found := by_key(worker([first, second], confirmed))
	object.keys(found) == {"a1", "a1/quiet"}
	found.a1.by == {"date": "2024-03-31", "ref": "audiogram/a2"}
	found["a1/quiet"].value == 12
	found["a1/quiet"].at_least == "quiet_period"
	found["a1/quiet"].on == "2024-03-31"
	found["a1/quiet"].missing == []
}

test_quiet_not_recorded if {
	found := by_key(worker([first, object.union(second, {"quiet_hours": null})], confirmed))
	found["a1/quiet"].value == null
	found["a1/quiet"].missing == ["hours without noise before the confirmation audiogram"]
}

test_right_ear_alone if {
	w := worker([test("a1", "2024-03-01", false, {"schemes": {"one_test": {"left": false, "right": true}}})], [])
	object.keys(by_key(w)) == {"a1"}
}

test_a_test_that_confirms_needs_no_confirmation if {
	next := test("a2", "2025-03-01", true, {})
	object.keys(by_key(worker([first, next], confirmed))) == {"a1", "a1/quiet"}
}

test_a_later_test_that_refutes_is_the_second_test_all_the_same if {
	next := test("a2", "2025-03-01", false, {})
	by_key(worker([first, next], [])).a1.by == {"date": "2025-03-01", "ref": "audiogram/a2"}
}

test_immediate_retest if {
	again := test("a2", "2024-03-01", true, {"retest_of": "audiogram/a1"})
	by_key(worker([first, again], confirmed)).a1.by == null
	cleared := test("a2", "2024-03-01", false, {"retest_of": "audiogram/a1"})
	by_key(worker([first, cleared], [])) == {}
	count(duty.not_owed) == 1 with input as worker([first, cleared], [])
	half := test("a2", "2024-03-01", null, {"retest_of": "audiogram/a1"})
	by_key(worker([first, half], [])).a1.by == null
}

test_an_invalid_test_confirms_nothing if {
	by_key(worker([first, object.union(second, {"invalidated": true})], [])).a1.by == null
}

test_not_comparable if {
	unclear := test("a1", "2024-03-01", null, {"cannot_compare": ["left 3000 Hz"]})
	found := by_key(worker([unclear], []))
	found.a1.holds == null
	found.a1.missing == ["left 3000 Hz"]
	duty.not_owed == set() with input as worker([unclear], [])
	half := test("a1", "2024-03-01", true, {"cannot_compare": ["left 3000 Hz"]})
	by_key(worker([half], [])).a1.within == "confirmation_time"
}

test_not_owed[what] if {
	some what, change in {
		"no shift": {"schemes": {"one_test": {"left": false, "right": false}}},
		"not in the program": {"enrolled": false},
		"invalid": {"invalidated": true},
		"exit test": {"purpose": "exit"},
		"retest": {"retest_of": "audiogram/a0"},
	}
	w := worker([object.union(first, change)], [])
	duty.obligations == set() with input as w
	count(duty.not_owed) == 1 with input as w
}

test_owed_and_so_not_silent if {
	duty.not_owed == set() with input as worker([first], [])
	count(duty.not_owed) == 1 with input as worker([], [])
}
