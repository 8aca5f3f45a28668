package duty.workers_informed_test

import data.duty.workers_informed
import rego.v2

worker(from, told) := {
	"as_of": "2026-06-30", "exposed": {"limit": [{"from": from, "to": null, "current": true}]}, "told_of_exposure": told,
	"exposures": [
		{"from": "2019-01-01", "to": from, "group": "g0"},
		{"from": from, "to": "2025-01-01", "group": "g1"}, {"from": "2025-01-01", "to": null, "group": "g1"},
	],
}

notice(day) := {"date": day, "ref": "notice/n", "about": "exposure"}

answers(dossier) := found if found := {[o.after, o.by] | some o in workers_informed.obligations} with input as dossier

test_not_told if {
	answers(worker("2020-01-01", [])) == {["2023-06-16", null]}
	answers(worker("2024-01-01", [notice("2023-12-31")])) == {["2024-01-01", null]}
	count(workers_informed.not_owed) == 0 with input as worker("2020-01-01", [])
}

test_told if {
	answers(worker("2020-01-01", [notice("2022-01-01"), notice("2023-06-16")])) == {["2023-06-16", {"date": "2023-06-16", "ref": "notice/n"}]}
	answers(worker("2024-01-01", [notice("2024-01-01")])) == {["2024-01-01", {"date": "2024-01-01", "ref": "notice/n"}]}
}

test_told_before_it_was_so if {
	# back in the group after a year elsewhere
	back := object.union(worker("2020-01-01", [notice("2023-07-01")]), {"exposures": [
		{"from": "2020-01-01", "to": "2024-01-01", "group": "g1"}, {"from": "2024-01-01", "to": "2025-01-01", "group": "g2"},
		{"from": "2025-01-01", "to": null, "group": "g1"},
	]})
	answers(back) == {["2025-01-01", null]}

	# told of a situation that was within the limits then
	answers(object.union(worker("2020-01-01", [notice("2023-07-01")]), {"exposed": {"limit": [{"from": "2025-08-05", "to": null, "current": true}]}})) == {["2025-08-05", null]}
}

test_not_owed if {
	every changes in [{"exposed": {"limit": []}}, {"as_of": "2023-06-15"}] {
		dossier := object.union(worker("2020-01-01", []), changes)
		answers(dossier) == set()
		count(workers_informed.not_owed) == 1 with input as dossier
	}
}
