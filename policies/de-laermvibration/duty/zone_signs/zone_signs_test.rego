package duty.zone_signs_test

import data.duty.zone_signs
import rego.v2

area(current, documents) := {
	"workers": 4, "documents": documents,
	"exposed": {"upper_exceeded": [{"from": "2024-01-01", "to": null, "current": current}]},
}

paper := {"kind": "zone_signs", "date": "2024-05-02", "ref": "document/d1"}

holds(dossier) := found if found := {o.holds | some o in zone_signs.obligations} with input as dossier

reasons(dossier) := found if found := zone_signs.not_owed with input as dossier

test_no_document if {
	holds(area(true, [])) == {false}
	holds(area(true, [{"kind": "annual_report", "date": "2024-05-02", "ref": "document/d2"}])) == {false}
	some o in zone_signs.obligations with input as area(true, [])
	o.note == "no record shows that the area is marked with signs"
	count(reasons(area(true, []))) == 0
}

test_document if {
	some o in zone_signs.obligations with input as area(true, [paper])
	o.holds == true
	o.because == ["document/d1"]
}

test_not_at_that_level_now if {
	every dossier in [area(false, []), object.union(area(true, []), {"exposed": {"upper_exceeded": []}})] {
		holds(dossier) == set()
		count(reasons(dossier)) == 1
	}
}
