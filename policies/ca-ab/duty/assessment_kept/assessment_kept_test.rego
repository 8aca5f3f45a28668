package duty.assessment_kept_test

import data.duty.assessment_kept
import rego.v2

lost := {"id": "m9", "date": "2024-03-05", "ref": "notice/n"}

site(day, missing, number) := {
	"as_of": day, "missing_measurements": missing, "measurements": number,
	"latest_measurement": {"date": "2024-03-05", "ref": "measurement/m1"},
}

found(dossier) := list if list := {object.remove(o, ["note", "because", "facts"]) | some o in assessment_kept.obligations} with input as dossier

test_lost if {
	found(site("2026-06-30", [lost], 0)) == {{"key": "m9", "holds": false, "on": "2024-03-05", "for": "assessment_retention"}}
	count(assessment_kept.not_owed) == 0 with input as site("2026-06-30", [lost], 0)
}

test_lost_from_before if {
	old := object.union(lost, {"date": "2015-03-05"})
	found(site("2026-06-30", [old], 0)) == {{"key": "m9", "holds": false, "on": "2023-03-31", "for": "assessment_retention"}}
	found(site("2023-03-30", [old], 0)) == {{"key": "m9", "holds": false, "on": "2015-03-05"}}
}

test_on_file if {
	found(site("2026-06-30", [], 3)) == {{"key": "on file", "holds": true}}
	some o in assessment_kept.obligations with input as site("2026-06-30", [], 3)
	o.because == ["measurement/m1"]
}

test_not_owed if {
	found(site("2026-06-30", [], 0)) == set()
	count(assessment_kept.not_owed) == 1 with input as site("2026-06-30", [], 0)
}
