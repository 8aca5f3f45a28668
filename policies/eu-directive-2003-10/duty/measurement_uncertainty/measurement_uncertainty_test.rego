package duty.measurement_uncertainty_test

import data.duty.measurement_uncertainty
import rego.v2

group(class, u_db, documents) := {
	"documents": documents, "now": {"channels": {"day": {"u_db": u_db}}},
	"measurements": [{"ref": "measurement/m1", "current": true, "levelled": true, "accuracy_class": class}],
}

report(heads) := [{"kind": "noise_measurement_report", "ref": "document/d1", "covers": heads}]

holds(dossier) := found if found := {o.holds | some o in measurement_uncertainty.obligations} with input as dossier

test_class_on_record if holds(group("2", null, [])) == {true}

test_uncertainty_on_record if holds(group(null, 2.1, [])) == {true}

test_report_covers_it if holds(group(null, null, report(["method", "uncertainty"]))) == {true}

test_report_does_not_cover_it if {
	some o in measurement_uncertainty.obligations with input as group(null, null, report(["method"]))
	o.holds == false
	contains(o.note, "does not cover")
	o.missing == []
}

test_nobody_knows if {
	some o in measurement_uncertainty.obligations with input as group(null, null, report([]))
	o.holds == null
	contains(o.note, "as if it were exact")
	count(o.missing) == 1
	holds(group(null, null, [])) == {null}
	count(measurement_uncertainty.not_owed) == 0 with input as group(null, null, [])
}

test_no_level_measured if {
	peak_only := object.union(group(null, null, []), {"measurements": [{"ref": "measurement/m1", "current": true, "levelled": false}]})
	holds(peak_only) == set()
	count(measurement_uncertainty.not_owed) == 1 with input as peak_only
}
