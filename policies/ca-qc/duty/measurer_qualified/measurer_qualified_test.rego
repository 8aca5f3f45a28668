package duty.measurer_qualified_test

import data.duty.measurer_qualified
import rego.v2

site(day, papers) := {"measurements": 4, "latest_measurement": {"date": day, "ref": "measurement/m1"}, "documents": papers}

holds(dossier) := found if found := {o.holds | some o in measurer_qualified.obligations} with input as dossier

test_no_document if {
	holds(site("2023-06-16", [])) == {false}
	holds(site("2023-06-16", [{"kind": "advice", "ref": "document/a"}])) == {false}
	count(measurer_qualified.not_owed) == 0 with input as site("2023-06-16", [])
}

test_document if {
	some o in measurer_qualified.obligations with input as site("2023-06-16", [{"kind": "competence", "ref": "document/c"}])
	o.holds == true
	o.note == null
	o.because == ["measurement/m1", "document/c"]
}

test_not_owed if {
	holds(site("2023-06-15", [])) == set()
	count(measurer_qualified.not_owed) == 1 with input as site("2023-06-15", [])
	count(measurer_qualified.not_owed) == 1 with input as object.union(site("2023-06-16", []), {"latest_measurement": null})
}
