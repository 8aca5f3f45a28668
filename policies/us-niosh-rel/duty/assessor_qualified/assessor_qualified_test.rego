package duty.assessor_qualified_test

import data.duty.assessor_qualified
import rego.v2

paper := {"kind": "competence", "date": "2024-01-10", "ref": "document/1"}

other := {"kind": "advice", "date": "2024-01-10", "ref": "document/2"}

site(measurements, papers) := {"measurements": measurements, "latest_measurement": {"date": "2024-01-10", "ref": "measurement/m1"}, "documents": papers}

holds(dossier) := found if found := {o.holds | some o in assessor_qualified.obligations} with input as dossier

test_on_record if {
	some o in assessor_qualified.obligations with input as site(1, [other, paper])
	o.holds == true
	o.on == "2024-01-10"
	o.because == ["document/1"]
}

test_missing if {
	holds(site(1, [other])) == {false}
	count(assessor_qualified.not_owed) == 0 with input as site(1, [])
}

test_not_owed if {
	holds(site(0, [paper])) == set()
	count(assessor_qualified.not_owed) == 1 with input as site(0, [])
}
