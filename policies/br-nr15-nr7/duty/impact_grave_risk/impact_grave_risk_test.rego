package duty.impact_grave_risk_test

import data.duty.impact_grave_risk as duty
import rego.v2

since(day) := {"from": day, "to": null, "current": true}

formerly := {"from": "2020-01-01", "to": "2024-01-01", "current": false}

limits := {"impulse_grave_risk": {"values": [{"from": "1978-06-08", "to": null, "value": 140}]}, "impact_grave_risk_fast": {"values": [{"from": "1978-06-08", "to": null, "value": 130}]}}

open := {"from": "1978-06-08", "to": null, "reason": "not measured"}

exact(level) := {"at_least": level, "at_most": level}

now := {"ref": "measurement/m1", "measured_on": "2024-01-10", "channels": {"impulse": exact(140 + 1), "fast": exact(130 + 1)}}

# Which of the two was measured, and which of the two is exceeded.
group(impulse, fast, exceeded) := {
	"as_of": "2026-06-30", "now": now, "impulsive": true, "workers": 3, "protector_holders": 3, "documents": [],
	"exposure_unknown": {"grave_impulse": [open | not impulse], "grave_fast": [open | not fast]},
	"exposed": {
		"grave_impulse": [since("2024-01-10") | "impulse" in exceeded],
		"grave_fast": [since("2024-01-10") | "fast" in exceeded],
	},
}

obligation(g) := o if some o in duty.obligations with input as g with data.parameters as limits

reasons(g) := found if found := duty.not_owed with input as g with data.parameters as limits

evaluation(day) := {"date": day, "ref": "document/d1", "kind": "attenuation_evaluation"}

test_somebody_without_protector if {
	obligation(object.union(group(true, true, {"impulse"}), {"protector_holders": 1})).holds == false
	obligation(object.union(group(false, true, {"fast"}), {"protector_holders": 1})).facts.limit_db == 130
}

test_all_protected_and_evaluated if {
	obligation(object.union(group(true, true, {"impulse"}), {"documents": [evaluation("2024-01-10")]})).holds == true
}

test_all_protected_is_a_question if {
	obligation(group(true, true, {"impulse"})).ask != null
	obligation(object.union(group(true, true, {"impulse"}), {"documents": [evaluation("2024-01-09")]})).ask != null
}

test_measured_and_below if {
	obligation(group(true, true, {"fast"})).holds == true
	reasons(group(true, true, {"fast"})) == set()
}

test_not_measured if {
	not obligation(group(false, false, set()))
	count(reasons(object.union(group(false, false, set()), {"now": null}))) == 1
}
