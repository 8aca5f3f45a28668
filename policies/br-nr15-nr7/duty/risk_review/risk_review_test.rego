package duty.risk_review_test

import data.duty.risk_review as duty
import rego.v2

site(certified, documents) := {"choices": {"certified_management_system": certified}, "documents": documents}

assessment := {"date": "2024-03-01", "ref": "document/d1", "kind": "risk_assessment"}

old := object.union(assessment, {"date": "2019-03-01"})

since := {"values": [{"from": "2022-01-03"}]}

obligation(s) := o if some o in duty.obligations with input as s with data.parameters.risk_review_interval as since

test_every_two_years if {
	o := obligation(site(false, [assessment]))
	o.every == "risk_review_interval"
	o.during == {"from": "2024-03-01", "to": null}
	o.by == "document.risk_assessment"
}

test_every_three_years_with_a_certified_system if {
	obligation(site(true, [assessment])).every == "risk_review_interval_certified"
}

test_assessment_from_before_the_rule if obligation(site(false, [old])).during.from == "2022-01-03"

test_none if {
	other := object.union(assessment, {"kind": "zone_signs"})
	obligation(site(false, [other])).holds == false
	reasons := duty.not_owed with input as site(false, [])
	count(reasons) == 0
}
