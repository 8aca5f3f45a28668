package duty.health_record_test

import data.duty.health_record
import rego.v2

site(ever, documents) := {
	"enrolled_now": ever, "documents": documents,
	"levels_now": [level | some level in ["lower_reached", "upper_exceeded"]; ever > 0],
}

arranged := {"kind": "surveillance_arrangement", "date": "2024-05-02", "ref": "document/d3"}

paper := {"kind": "health_records", "date": "2024-05-02", "ref": "document/d1"}

holds(dossier) := found if found := {o.holds | some o in health_record.obligations} with input as dossier

test_no_document if {
	holds(site(4, [])) == {false}
	holds(site(4, [{"kind": "annual_report", "date": "2024-05-02", "ref": "document/d2"}])) == {false}
	some o in health_record.obligations with input as site(4, [])
	o.note == "no record shows that individual health records are kept"
	count(health_record.not_owed) == 0 with input as site(4, [])
}

test_document if {
	some o in health_record.obligations with input as site(1, [paper])
	o.holds == true
	o.because == ["document/d1"]
}

test_surveillance_that_is_arranged_has_records if holds(site(0, [arranged])) == {false}

test_nobody_in_noise if {
	holds(site(0, [])) == set()
	count(health_record.not_owed) == 1 with input as site(0, [])
}
