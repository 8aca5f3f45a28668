package duty.competent_services_test

import data.duty.competent_services
import rego.v2

site(ever, documents) := {"enrolled_ever": ever, "enrolled_now": ever, "documents": documents}

paper := {"kind": "competence", "date": "2024-05-02", "ref": "document/d1"}

holds(dossier) := found if found := {o.holds | some o in competent_services.obligations} with input as dossier

test_no_document if {
	holds(site(4, [])) == {false}
	holds(site(4, [{"kind": "annual_report", "date": "2024-05-02", "ref": "document/d2"}])) == {false}
	some o in competent_services.obligations with input as site(4, [])
	o.note == "no record shows that those who assess and measure are competent for it"
	count(competent_services.not_owed) == 0 with input as site(4, [])
}

test_document if {
	some o in competent_services.obligations with input as site(1, [paper])
	o.holds == true
	o.because == ["document/d1"]
}

test_nobody_in_noise if {
	holds(site(0, [])) == set()
	count(competent_services.not_owed) == 1 with input as site(0, [])
}
