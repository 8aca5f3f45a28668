package duty.protectors_available_test

import data.duty.protectors_available as duty
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

group(change) := object.union(
	{
		"as_of": "2026-06-30", "choices": {"exemption": "none"}, "workers": 4, "protector_holders": 0, "documents": [],
		"exposed": {"lower": [now], "upper": []},
	},
	change,
)

paper(kind) := {"kind": kind, "date": "2024-01-10", "ref": "document/a"}

test_no_record if obligation(group({})).holds == false

test_some_have_protectors if obligation(group({"protector_holders": 3})).holds == false

test_nobody_in_the_group if obligation(group({"workers": 0})).holds == false

test_everybody_has_one if obligation(group({"protector_holders": 4})).holds == true

test_on_record if {
	found := obligation(group({"documents": [paper("protectors_available")]}))
	found.holds == true
	found.because == ["document/a"]
	obligation(group({"documents": [paper("another")]})).holds == false
}

test_on_request_is_not_enough if {
	obligation(group({"documents": [paper("protectors_on_request")]})).holds == false
}

test_exempted if {
	endswith(obligation(group({"choices": {"exemption": "overall_risk"}})).cite, "reg 11")
	quiet(group({"choices": {"exemption": "defence"}, "exposed": {"lower": []}}))
}

test_not_concerned if {
	quiet(group({"exposed": {"lower": [past]}}))
	quiet(group({"exposed": {"upper": [now]}}))
}
