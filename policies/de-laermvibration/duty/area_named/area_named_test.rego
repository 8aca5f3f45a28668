package duty.area_named_test

import data.duty.area_named
import rego.v2

group(current, area) := {
	"id": "g1", "workers": 4, "area": area,
	"exposed": {"upper_exceeded": [{"from": "2024-01-01", "to": null, "current": current}]},
}

holds(dossier) := found if found := {o.holds | some o in area_named.obligations} with input as dossier

test_no_area if {
	some o in area_named.obligations with input as group(true, null)
	o.holds == false
	o.because == ["group/g1"]
	count(area_named.not_owed) == 0 with input as group(true, null)
}

test_area if {
	some o in area_named.obligations with input as group(true, "hall")
	o.holds == true
	o.note == null
}

test_not_above_now if {
	holds(group(false, null)) == set()
	count(area_named.not_owed) == 1 with input as group(false, null)
}
