package duty.risk_assessed_test

import data.duty.risk_assessed
import rego.v2

group(suspected, exposed, unknown, documents) := {
	"as_of": "2026-06-30", "suspected_noisy": suspected, "workers": 3, "documents": documents,
	"exposed": {"lower_reached": exposed}, "exposure_unknown": {"lower_reached": unknown},
}

now := [{"from": "2024-01-01", "to": null, "current": true, "reason": "not measured"}]

paper := {"kind": "risk_assessment", "date": "2024-05-02", "reviewed_on": null, "ref": "document/d1"}

holds(dossier) := found if found := {o.holds | some o in risk_assessed.obligations} with input as dossier

reasons(dossier) := found if found := risk_assessed.not_owed with input as dossier

test_not_assessed if {
	holds(group(true, now, [], [])) == {false}
	holds(group(false, now, [], [{"kind": "advice", "ref": "document/d2"}])) == {false}
	holds(group(true, [], now, [])) == {false}
	holds(group(true, [], [], [])) == {false}
	count(reasons(group(true, now, [], []))) == 0
}

test_assessed if {
	some o in risk_assessed.obligations with input as group(true, now, [], [paper])
	o.holds == true
	o.note == null
	o.because == ["document/d1"]
}

test_nobody_has_said if {
	holds(group(null, [], now, [])) == {null}
	holds(group(null, [], now, [paper])) == set()
	count(reasons(group(null, [], now, [paper]))) == 1
}

test_no_noise if {
	holds(group(false, [], now, [])) == set()
	count(reasons(group(false, [], now, []))) == 1
	holds(group(null, [], [], [])) == set()
	count(reasons(group(null, [], [], []))) == 1
}
