package duty.exemption_test

import data.duty.exemption as duty
import rego.v2

now := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2020-01-01", "to": "2021-01-01", "current": false}

open := {"from": "2024-01-01", "to": null, "reason": "not measured"}

obligation(dossier) := only if {
	all := duty.obligations with input as dossier
	some only in all
	count(all) == 1
}

quiet(dossier) if {
	count(duty.obligations) == 0 with input as dossier
	count(duty.not_owed) == 1 with input as dossier
}

every_word := data.parameters.exemption_conditions.values[0].value

paper(day, covers) := {"kind": "exemption", "date": day, "ref": "document/x", "covers": covers}

site(exemption, documents) := {"choices": {"exemption": exemption}, "documents": documents}

test_no_certificate if {
	obligation(site("overall_risk", [])).holds == false
	obligation(site("defence", [object.union(paper("2024-01-10", []), {"kind": "another"})])).holds == false
}

test_certificate_of_another_kind_of_exemption if {
	every exemption in ["emergency_services", "defence"] {
		obligation(site(exemption, [paper("2024-01-10", [])])).holds == true
	}
}

test_conditions if {
	obligation(site("overall_risk", [paper("2024-01-10", every_word)])).holds == true
	obligation(site("overall_risk", [paper("2024-01-10", [])])).missing == ["what the record covers"]
	every word in every_word {
		found := obligation(site("overall_risk", [paper("2024-01-10", [other | some other in every_word; other != word])]))
		found.note == sprintf("not shown: %s", [replace(word, "_", " ")])
		found.holds == false
	}
}

test_before_the_law if obligation(site("overall_risk", [paper("2006-04-05", every_word)])).holds == null

test_none_claimed if quiet(site("none", []))
