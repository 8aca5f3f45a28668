package duty.cases_reported_test

import data.duty.cases_reported as duty
import rego.v2

report(covers) := {"date": "2025-03-01", "ref": "document/d1", "kind": "analytical_report", "covers": covers}

site(ever, documents) := {"enrolled_ever": ever, "documents": documents}

holds(s) := found if found := {o.holds | some o in duty.obligations} with input as s

reasons(s) := found if found := duty.not_owed with input as s

test_latest_report_counts if {
	holds(site(1, [report(["other"]), report(["other", "hearing_cases"])])) == {true}
	holds(site(1, [report(["hearing_cases"]), report(["other"])])) == {false}
}

test_contents_not_recorded if {
	holds(site(1, [report([])])) == {null}
	reasons(site(1, [report([])])) == set()
}

test_no_report_or_nobody_concerned if {
	holds(site(1, [object.union(report([]), {"kind": "zone_signs"})])) == set()
	count(reasons(site(1, []))) == 1
	count(reasons(site(0, [report([])]))) == 1
}
