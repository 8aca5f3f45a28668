package duty.protector_effectiveness_test

import data.duty.protector_effectiveness
import rego.v2

group(current, documents) := {
	"workers": 4, "protector_holders": 2, "documents": documents,
	"exposed": {"lower_exceeded": [{"from": "2024-01-01", "to": null, "current": current}]},
}

paper := {"kind": "attenuation_evaluation", "date": "2024-05-02", "ref": "document/d1"}

holds(dossier) := found if found := {o.holds | some o in protector_effectiveness.obligations} with input as dossier

reasons(dossier) := found if found := protector_effectiveness.not_owed with input as dossier

test_no_document if {
	holds(group(true, [])) == {false}
	holds(group(true, [{"kind": "annual_report", "date": "2024-05-02", "ref": "document/d2"}])) == {false}
	some o in protector_effectiveness.obligations with input as group(true, [])
	o.note == "no check of the protectors of the group is on record"
	count(reasons(group(true, []))) == 0
}

test_document if {
	some o in protector_effectiveness.obligations with input as group(true, [paper])
	o.holds == true
	o.because == ["document/d1"]
}

test_nobody_has_a_protector if {
	without := object.union(group(true, []), {"protector_holders": 0})
	holds(without) == set()
	count(reasons(without)) == 1
}

test_not_at_that_level_now if {
	every dossier in [group(false, []), object.union(group(true, []), {"exposed": {"lower_exceeded": []}})] {
		holds(dossier) == set()
		count(reasons(dossier)) == 1
	}
}
