package duty.dual_protection_test

import data.duty.dual_protection
import rego.v2

now := {"from": "2024-01-01", "to": null, "current": true}

formerly := {"from": "2020-01-01", "to": "2022-01-01", "current": false}

protection(types) := {"date": "2024-01-10", "ref": "protector_issue/1", "types": types}

worker := {
	"as_of": "2026-06-30",
	"enrolled": [now],
	"exposed": {"dual": [now]},
	"exposure_unknown": {"dual": []},
	"protection": null,
}

with_types(types) := object.union(worker, {"protection": protection(types)})

holds(dossier) := found if found := {o.holds | some o in dual_protection.obligations} with input as dossier

test_both_at_hand if {
	every types in [["premolded", "earmuff"], ["helmet_muff", "custom"], ["formable", "earmuff"], ["dual"], ["formable", null, "earmuff"]] {
		holds(with_types(types)) == {true}
	}
}

test_one_of_them_only if {
	every types in [["premolded", "formable"], ["earmuff"], ["helmet_muff", "earmuff"]] {
		holds(with_types(types)) == {false}
	}
	some o in dual_protection.obligations with input as with_types(["helmet_muff"])
	o.note == "exposure is above the dual hearing protection level, and only this is at hand: helmet muff"
	o.because == ["protector_issue/1"]
}

test_nothing_at_hand if {
	holds(worker) == set()
	dual_protection.not_owed == {"no protector at hand, which is a finding of its own"} with input as worker
}

test_type_not_recorded if holds(with_types(["earmuff", null])) == {null}

test_not_known_whether_above if {
	unknown := object.union(worker, {
		"exposed": {"dual": []},
		"exposure_unknown": {"dual": [{"from": "2024-01-01", "to": null, "reason": "not measured"}]},
	})
	holds(unknown) == {null}
	count(dual_protection.not_owed) == 0 with input as unknown
	holds(object.union(unknown, {"enrolled": [formerly]})) == set()
}

test_known_to_be_above_counts_more if {
	both := object.union(with_types(["dual"]), {"exposure_unknown": {"dual": [{"from": "2024-01-01", "to": null, "reason": "not measured"}]}})
	holds(both) == {true}
}

test_not_above if {
	quiet := object.union(worker, {"exposed": {"dual": [formerly]}})
	holds(quiet) == set()
	count(dual_protection.not_owed) == 1 with input as quiet
	count(dual_protection.not_owed) == 0 with input as with_types(["dual"])
}
