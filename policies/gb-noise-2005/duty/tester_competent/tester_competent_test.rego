package duty.tester_competent_test

import data.duty.tester_competent as duty
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

tester(change) := object.union(
	{
		"tests": 3, "workers": 3, "registered": true, "qualification": "technician", "certificate": null, "competence_shown": null,
		"first_test": {"date": "2024-02-01", "ref": "audiogram/a1"}, "last_test": null,
	},
	change,
)

test_untrained_technician if {
	found := obligation(tester({}))
	found.holds == false
	found.because == ["audiogram/a1"]
}

test_trained_technician if {
	obligation(tester({"certificate": "BSA 1"})).holds == true
	obligation(tester({"competence_shown": true})).holds == true
}

test_professional if {
	every profession in ["physician", "licensed_professional"] { obligation(tester({"qualification": profession})).holds == true }
}

test_not_known if {
	obligation(tester({"registered": false})).missing == ["the tester and the qualification"]
	obligation(tester({"qualification": null})).missing == ["the qualification"]
}

test_not_used if quiet(tester({"tests": 0}))
