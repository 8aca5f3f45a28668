package duty.data_kept_test

import data.duty.data_kept
import rego.v2

lost := {"id": "m9", "date": "2025-03-05", "ref": "notice/exposure"}

paper := {"kind": "records_kept", "date": "2024-05-02", "ref": "document/d1"}

site(measurements, missing, documents) := {"measurements": measurements, "missing_measurements": missing, "documents": documents}

holds(dossier) := found if found := {[o.key, o.holds] | some o in data_kept.obligations} with input as dossier

test_arrangement_on_record if {
	holds(site(3, [], [paper])) == {["arrangement", true]}
	count(data_kept.not_owed) == 0 with input as site(3, [], [paper])
}

test_no_arrangement if {
	some o in data_kept.obligations with input as site(3, [], [{"kind": "advice", "ref": "document/d2"}])
	o.holds == false
	contains(o.note, "no record shows")
}

test_lost if {
	holds(site(3, [lost], [paper])) == {["arrangement", true], ["m9", false]}
	some o in data_kept.obligations with input as site(0, [lost], [])
	o.for == "measurement_retention"
	count(data_kept.not_owed) == 0 with input as site(0, [lost], [])
}

test_nothing_measured if {
	holds(site(0, [], [])) == set()
	count(data_kept.not_owed) == 1 with input as site(0, [], [])
}
