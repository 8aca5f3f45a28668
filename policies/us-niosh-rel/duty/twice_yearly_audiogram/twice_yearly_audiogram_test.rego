package duty.twice_yearly_audiogram_test

import data.duty.twice_yearly_audiogram as duty
import rego.v2

spell(from, to) := {"from": from, "to": to, "current": to == null}

worker(tested, above, unknown) := {
	"as_of": "2026-06-30",
	"enrolled": [{"from": "2020-01-01", "to": null, "current": true, "tested": tested}],
	"exposed": {"twice": above},
	"exposure_unknown": {"twice": unknown},
}

during(w) := found if found := {o.during | some o in duty.obligations} with input as w

test_while_both_hold[what] if {
	some what, case in {
		"open": [spell("2021-01-01", null), spell("2020-01-01", null), {"from": "2021-01-01", "to": null}],
		"later above": [spell("2021-01-01", null), spell("2022-01-01", "2023-01-01"), {"from": "2022-01-01", "to": "2023-01-01"}],
		"left the program": [spell("2021-01-01", "2022-06-01"), spell("2021-02-01", "2023-01-01"), {"from": "2021-02-01", "to": "2022-06-01"}],
		"no longer above": [spell("2021-01-01", "2022-06-01"), spell("2020-01-01", "2022-01-01"), {"from": "2021-01-01", "to": "2022-01-01"}],
	}
	during(worker(case[0], [case[1]], [])) == {case[2]}
	duty.not_owed == set() with input as worker(case[0], [case[1]], [])
}

test_ended_on_the_day_on_which_the_other_begins if {
	w := worker(spell("2021-01-01", null), [spell("2020-01-01", "2021-01-01")], [])
	during(w) == set()
	count(duty.not_owed) == 1 with input as w
	before := worker(spell("2020-01-01", "2021-01-01"), [spell("2021-01-01", null)], [])
	during(before) == set()
}

test_not_known_now if {
	w := worker(spell("2021-01-01", null), [], [{"from": "2024-01-01", "to": null, "reason": "not measured"}])
	some o in duty.obligations with input as w
	o.holds == null
	o.note == "it is not known whether exposure is so high that two tests a year are good practice: not measured"
	o.missing == ["an exposure that can be held against the level for two tests a year"]
	duty.not_owed == set() with input as w
}

test_not_known_formerly if {
	w := worker(spell("2021-01-01", null), [], [{"from": "2024-01-01", "to": "2025-01-01", "reason": "not measured"}])
	duty.obligations == set() with input as w
	count(duty.not_owed) == 1 with input as w
}

test_no_baseline_yet if {
	w := worker(null, [spell("2021-01-01", null)], [{"from": "2020-01-01", "to": null, "reason": "not measured"}])
	duty.obligations == set() with input as w
	count(duty.not_owed) == 1 with input as w
}
