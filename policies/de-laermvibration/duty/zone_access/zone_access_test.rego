package duty.zone_access_test

import data.duty.zone_access
import rego.v2

area(current, documents) := {
	"workers": 4, "documents": documents,
	"exposed": {"upper_exceeded": [{"from": "2024-01-01", "to": null, "current": current}]},
}

paper(kind, day) := {"kind": kind, "date": day, "ref": sprintf("document/%s", [day])}

test_nobody_has_answered if {
	some o in zone_access.obligations with input as area(true, [paper("zone_signs", "2024-01-01")])
	o.by == null
	count(zone_access.not_owed) == 0 with input as area(true, [])
}

test_the_latest_answer_counts if {
	some o in zone_access.obligations with input as area(true, [paper("zone_plan", "2024-01-01"), paper("access_restriction", "2025-01-01")])
	o.by == {"date": "2025-01-01", "ref": "document/2025-01-01"}
}

test_not_above_now if {
	found := zone_access.obligations with input as area(false, [])
	count(found) == 0
	count(zone_access.not_owed) == 1 with input as area(false, [])
}
