package duty.exemption_reviewed_test

import data.duty.exemption_reviewed
import rego.v2

site(reviewed) := {"documents": [
	{"kind": "exemption", "date": "2020-03-01", "ref": "d1", "reviewed_on": reviewed},
	{"kind": "advice", "date": "2020-03-01", "ref": "d2", "reviewed_on": null},
]}

found(dossier) := by_key if by_key := {o.key: o | some o in exemption_reviewed.obligations} with input as dossier

test_not_reviewed if {
	o := found(site(null))
	object.keys(o) == {"d1"}
	o.d1.after == "2020-03-01"
	o.d1.within == "exemption_review"
	count(exemption_reviewed.not_owed) == 0 with input as site(null)
}

test_reviewed if {
	o := found(site("2024-03-01"))
	o["first review of d1"].by == {"date": "2024-03-01", "ref": "d1"}
	o.d1.after == "2024-03-01"
}

test_no_exemption if {
	found({"documents": []}) == {}
	count(exemption_reviewed.not_owed) == 1 with input as {"documents": []}
}
