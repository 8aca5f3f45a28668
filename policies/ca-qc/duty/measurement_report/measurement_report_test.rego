package duty.measurement_report_test

import data.duty.measurement_report
import rego.v2

measurement := {"id": "m1", "date": "2024-03-05", "ref": "measurement/m1"}

paper(day, covers) := {"kind": "noise_measurement_report", "date": day, "ref": "document/r", "covers": covers}

group(measurement, papers) := {"measurements": [measurement], "documents": papers}

answers(dossier) := found if found := {o.by | some o in measurement_report.obligations} with input as dossier

test_no_report if {
	answers(group(measurement, [])) == {null}
	answers(group(measurement, [paper("2024-04-01", ["m2"])])) == {null}
	answers(group(measurement, [paper("2024-03-04", [])])) == {null}
	answers(group(measurement, [object.union(paper("2024-04-01", ["m1"]), {"kind": "advice"})])) == {null}
	count(measurement_report.not_owed) == 0 with input as group(measurement, [])
}

test_report if {
	answers(group(measurement, [paper("2024-04-01", ["m1"])])) == {{"date": "2024-04-01", "ref": "document/r"}}
	answers(group(measurement, [paper("2024-03-05", [])])) == {{"date": "2024-03-05", "ref": "document/r"}}
}

test_measured_before_the_section if {
	old := object.union(measurement, {"date": "2023-06-15"})
	answers(group(old, [])) == set()
	count(measurement_report.not_owed) == 1 with input as group(old, [])
}
