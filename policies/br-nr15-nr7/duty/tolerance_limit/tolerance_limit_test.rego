package duty.tolerance_limit_test

import data.duty.tolerance_limit as duty
import rego.v2

since(day) := {"from": day, "to": null, "current": true}

formerly := {"from": "2020-01-01", "to": "2024-01-01", "current": false}

now := {"ref": "measurement/m1", "channels": {"limit": {"dose_pct": 120, "at_least": 120, "at_most": 120, "working": ["dose 120 % measured"]}}}

group(exposed, unknown) := {
	"as_of": "2026-06-30", "exposed": {"limit": exposed}, "exposure_unknown": {"limit": unknown}, "workers": 3,
	"first_survey": {"date": "2024-01-10", "ref": "measurement/m1"}, "suspected_noisy": true, "now": now,
}

open(day) := {"from": day, "to": null, "reason": "not measured since"}

holds(g) := found if found := {o.holds | some o in duty.obligations} with input as g

reasons(g) := found if found := duty.not_owed with input as g

test_above if {
	holds(group([since("2024-01-10")], [])) == {false}
	some o in duty.obligations with input as group([since("2024-01-10")], [])
	o.facts.dose_pct == 120
	o.because == ["measurement/m1"]
	o.on == "2024-01-10"
}

test_not_above if {
	holds(group([formerly], [])) == {true}
	reasons(group([], [])) == set()
}

test_not_known if {
	holds(group([], [open("2026-06-30")])) == {null}
	holds(group([], [object.union(open("2024-01-01"), {"to": "2026-06-30"})])) == {true}
}

test_no_dose if {
	never := object.union(group([], [open("2024-01-01")]), {"first_survey": null, "now": null})
	holds(never) == set()
	count(reasons(never)) == 1
}

test_nothing_told_of_today if {
	bare := object.union(group([], []), {"now": null})
	some o in duty.obligations with input as bare
	o.facts == {}
}

test_now_without_a_measurement if {
	bare := object.union(group([], [open("2026-06-30")]), {"now": object.union(now, {"ref": null})})
	some o in duty.obligations with input as bare
	o.because == []
}
