package duty.reduced_time_test

import data.duty.reduced_time
import rego.v2

schedule(day) := {"kind": "schedule", "date": day, "ref": "document/s", "covers": []}

now(day, level) := {"measured_on": day, "ref": "measurement/m1", "channels": {"day": {"at_most": level}}}

group(papers, now) := {"documents": papers, "now": now}

values(dossier) := found if found := {[o.key, o.value] | some o in reduced_time.obligations} with input as dossier

test_measured_with_the_schedule if {
	values(group([schedule("2024-03-01")], now("2024-03-01", 85))) == {["2024-03-01", 85]}
	some o in reduced_time.obligations with input as group([schedule("2024-03-01")], now("2024-03-01", 85))
	o.because == ["document/s", "measurement/m1"]
	count(reduced_time.not_owed) == 0 with input as group([schedule("2024-03-01")], null)
}

test_latest_schedule_counts if values(group([schedule("2024-03-01"), schedule("2025-03-01")], now("2024-03-01", 85))) == {["2025-03-01", null]}

test_not_measured_since if {
	values(group([schedule("2024-03-01")], now("2024-02-29", 85))) == {["2024-03-01", null]}
	values(group([schedule("2024-03-01")], now("2024-03-02", null))) == {["2024-03-01", null]}
	values(group([schedule("2024-03-01")], null)) == {["2024-03-01", null]}
}

test_not_owed if {
	every papers in [[], [schedule("2023-06-15")], [object.union(schedule("2024-03-01"), {"kind": "advice"})]] {
		values(group(papers, null)) == set()
		count(reduced_time.not_owed) == 1 with input as group(papers, null)
	}
}
