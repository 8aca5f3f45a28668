package duty.zone_protection_test

import data.duty.zone_protection
import rego.v2

area(current, looks) := {
	"workers": 4, "wear_checks": looks,
	"exposed": {"upper_exceeded": [{"from": "2024-01-01", "to": null, "current": current}]},
}

look(day, observed, wearing) := {"date": day, "ref": sprintf("wear_check/%s", [day]), "observed": observed, "wearing": wearing}

holds(dossier) := found if found := {o.holds | some o in zone_protection.obligations} with input as dossier

test_the_latest_look_counts if {
	holds(area(true, [look("2024-02-01", 4, 2), look("2025-02-01", 4, 4), look("2025-03-01", null, null)])) == {true}
	some o in zone_protection.obligations with input as area(true, [look("2025-02-01", 4, 3)])
	o.holds == false
	o.note == "of 4 in the noise area 3 wore protectors"
	o.because == ["wear_check/2025-02-01"]
}

test_nobody_has_looked if {
	some o in zone_protection.obligations with input as area(true, [look("2025-02-01", 0, 0)])
	o.holds == null
	count(o.missing) == 1
	count(zone_protection.not_owed) == 0 with input as area(true, [])
}

test_no_noise_area if {
	holds(area(false, [])) == set()
	count(zone_protection.not_owed) == 1 with input as area(false, [])
}
