package duty.aso_issued_test

import data.duty.aso_issued as duty
import rego.v2

examination(certificate) := {
	"id": "e1", "ref": "examination/e1", "kind": "health_appointment", "purpose": "periodic",
	"attended_on": "2024-02-20", "certificate_on": certificate,
}

obligation(list) := o if some o in duty.obligations with input as {"examinations": list}

test_issued if {
	obligation([examination("2024-02-21")]).by == {"date": "2024-02-21", "ref": "examination/e1"}
}

test_not_issued if obligation([examination(null)]).by == null

test_no_clinical_examination if {
	every change in [{"kind": "hearing_test"}, {"attended_on": null}] {
		list := [object.union(examination(null), change)]
		not obligation(list)
		reasons := duty.not_owed with input as {"examinations": list}
		count(reasons) == 1
	}
}
