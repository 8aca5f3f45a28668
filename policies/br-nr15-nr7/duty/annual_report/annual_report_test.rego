package duty.annual_report_test

import data.duty.annual_report as duty
import rego.v2

report := {"date": "2025-03-01", "ref": "document/d1", "kind": "analytical_report"}

site(workers, ever, documents) := {"workers": workers, "enrolled_ever": ever, "documents": documents}

since := {"values": [{"from": "2022-01-03"}]}

obligation(s) := o if some o in duty.obligations with input as s with data.parameters.report_interval as since

test_every_year_from_the_first_report_on if {
	o := obligation(site(3, 0, [report, object.union(report, {"date": "2026-03-01"})]))
	o.every == "report_interval"
	o.during.from == "2025-03-01"
	o.by == "document.analytical_report"
}

test_report_from_before_the_rule if {
	obligation(site(3, 0, [object.union(report, {"date": "2020-03-01"})])).during.from == "2022-01-03"
}

test_no_report if {
	obligation(site(3, 0, [])).holds == false
	obligation(site(0, 1, [object.union(report, {"kind": "zone_signs"})])).holds == false
}

test_nobody if {
	not obligation(site(0, 0, []))
	reasons := duty.not_owed with input as site(0, 0, [])
	count(reasons) == 1
}
