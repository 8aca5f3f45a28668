package duty.measurement_method_test

import data.duty.measurement_method
import rego.v2

group(current, documents) := {"documents": documents, "measurements": [{"ref": "measurement/m1", "current": current}]}

report := {"kind": "noise_measurement_report", "date": "2024-05-02", "ref": "document/d1"}

holds(dossier) := found if found := {o.holds | some o in measurement_method.obligations} with input as dossier

test_no_report if {
	holds(group(true, [])) == {false}
	holds(group(true, [{"kind": "advice", "ref": "document/d2"}])) == {false}
	count(measurement_method.not_owed) == 0 with input as group(true, [])
}

test_report if {
	some o in measurement_method.obligations with input as group(true, [report])
	o.holds == true
	o.note == null
	o.because == ["document/d1", "measurement/m1"]
}

test_nothing_measured if {
	holds(group(false, [report])) == set()
	count(measurement_method.not_owed) == 1 with input as group(false, [report])
}
