package duty.continuous_ceiling_test

import data.duty.continuous_ceiling as duty
import rego.v2

since(day) := {"from": day, "to": null, "current": true}

formerly := {"from": "2020-01-01", "to": "2024-01-01", "current": false}

now(level) := {"ref": "measurement/m1", "measured_on": "2024-01-10", "channels": {"continuous": {"at_least": level, "at_most": level}}}

group(ceiling, level, holders, documents) := {
	"as_of": "2026-06-30", "exposed": {"ceiling": ceiling, "limit": []}, "now": now(level),
	"workers": 3, "protector_holders": holders, "documents": documents,
}

evaluation(day) := {"date": day, "ref": "document/d1", "kind": "attenuation_evaluation"}

obligation(g) := o if some o in duty.obligations with input as g

above(holders, documents) := group([since("2024-01-10")], 116, holders, documents)

test_somebody_without_protector if {
	o := obligation(above(2, []))
	o.holds == false
	o.note == "the highest level measured, 116 dB(A), is above the ceiling, and 1 of 3 workers of the group have no protector on record"
}

test_all_protected_and_evaluated if {
	obligation(above(3, [evaluation("2024-01-10")])).holds == true
	obligation(above(3, [evaluation("2024-01-10")])).because == ["measurement/m1", "document/d1"]
}

test_evaluation_before_the_measurement_or_none_is_a_question if {
	obligation(above(3, [evaluation("2024-01-09")])).of == "occupational safety engineer or physician"
	obligation(above(3, [object.union(evaluation("2024-02-01"), {"kind": "zone_signs"})])).ask != null
}

test_not_above if {
	obligation(group([formerly], 115, 0, [])).holds == true
}

test_not_measured_above_the_limit if {
	unmeasured := object.union(group([], null, 0, []), {"exposed": {"ceiling": [], "limit": [since("2024-01-10")]}})
	obligation(unmeasured).holds == null
	reasons := duty.not_owed with input as unmeasured
	count(reasons) == 0
}

test_not_measured_below_the_limit if {
	quiet := object.union(group([], null, 0, []), {"now": null})
	found := duty.obligations with input as quiet
	count(found) == 0
	reasons := duty.not_owed with input as quiet
	count(reasons) == 1
}
