package duty.impact_limit_test

import data.duty.impact_limit as duty
import rego.v2

since(day) := {"from": day, "to": null, "current": true}

formerly := {"from": "2020-01-01", "to": "2024-01-01", "current": false}

limits := {"impulse_limit": {"values": [{"from": "1978-06-08", "to": null, "value": 130}]}, "impact_limit_fast": {"values": [{"from": "1978-06-08", "to": null, "value": 120}]}}

open := {"from": "1978-06-08", "to": null, "reason": "not measured"}

exact(level) := {"at_least": level, "at_most": level}

now := {"ref": "measurement/m1", "measured_on": "2024-01-10", "channels": {"impulse": exact(130 + 1), "fast": exact(120 + 1)}}

# Which of the two was measured, and which of the two is exceeded.
group(impulse, fast, exceeded) := {
	"as_of": "2026-06-30", "now": now, "impulsive": true, "workers": 3, "protector_holders": 3, "documents": [],
	"exposure_unknown": {"impulse": [open | not impulse], "impact_fast": [open | not fast]},
	"exposed": {
		"impulse": [since("2024-01-10") | "impulse" in exceeded],
		"impact_fast": [since("2024-01-10") | "fast" in exceeded],
	},
}

obligation(g) := o if some o in duty.obligations with input as g with data.parameters as limits

reasons(g) := found if found := duty.not_owed with input as g with data.parameters as limits

test_impulse_detector_decides if {
	obligation(group(true, true, {"impulse"})).holds == false
	obligation(group(true, true, {"impulse"})).facts.limit_db == 130
	obligation(group(true, true, {"fast"})).holds == true
	obligation(group(true, false, set())).holds == true
}

test_fast_where_there_was_none if {
	obligation(group(false, true, {"fast"})).holds == false
	obligation(group(false, true, {"fast"})).facts.measured_with == "C-weighted, fast"
	obligation(group(false, true, set())).holds == true
	reasons(group(false, true, set())) == set()
}

test_not_measured if {
	obligation(group(false, false, set())).holds == null
	nobody_said := object.union(group(false, false, set()), {"impulsive": null, "suspected_noisy": true})
	obligation(nobody_said).holds == null
	obligation(nobody_said).missing == ["whether impact noise occurs, or its level"]
}

test_no_impacts if {
	none := object.union(group(false, false, set()), {"impulsive": false, "now": null})
	not obligation(none)
	reasons(none) == {"no impact noise occurs"}
	reasons(object.union(none, {"impulsive": null, "suspected_noisy": false})) == {"nothing suggests noise"}
}
