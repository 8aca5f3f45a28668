package duty.exposure_assessed_test

import data.duty.exposure_assessed
import rego.v2

worker(exposures, unknown) := {
	"id": "w1", "as_of": "2026-06-30", "employed": [{"from": "2024-01-01", "to": null, "current": true}],
	"exposures": exposures, "exposure_working": [],
	"exposure_unknown": {"lower_reached": unknown, "lower_exceeded": [], "upper_reached": unknown, "upper_exceeded": [], "limit": []},
}

exposure(group, ref, own) := {"from": "2024-01-01", "to": null, "group": group, "ref": ref, "own": own}

gap_in_knowledge := [{"from": "2024-01-01", "to": null, "reason": "there is no full-shift measurement"}]

holds(dossier) := found if found := {o.holds | some o in exposure_assessed.obligations} with input as dossier

reasons(dossier) := found if found := exposure_assessed.not_owed with input as dossier

test_known if {
	holds(worker([exposure("g1", "measurement/m1", false)], [])) == {true}
	count(reasons(worker([exposure("g1", "measurement/m1", false)], []))) == 0
}

test_past_gaps_do_not_matter if {
	past := [{"from": "2024-01-01", "to": "2026-06-30", "reason": "not measured"}]
	holds(worker([exposure("g1", "measurement/m1", false)], past)) == {true}
}

test_in_no_group if {
	holds(worker([exposure(null, null, false)], gap_in_knowledge)) == {false}
	holds(worker([], [{"from": "2024-01-01", "to": null, "reason": null}])) == {false}
}

test_own_measurement_does_not_tell if {
	some o in exposure_assessed.obligations with input as worker([exposure("g1", "measurement/m1", true)], gap_in_knowledge)
	o.holds == null
	count(o.missing) == 1
}

test_told_of_the_group if {
	found := worker([exposure("g1", null, false)], gap_in_knowledge)
	holds(found) == set()
	count(reasons(found)) == 1
}

test_not_employed if {
	gone := object.union(worker([], gap_in_knowledge), {"employed": [{"from": "2020-01-01", "to": "2021-01-01", "current": false}]})
	holds(gone) == set()
	count(reasons(gone)) == 1
}
