package duty.report_posted_test

import data.duty.report_posted
import rego.v2

report(posted) := {"kind": "noise_measurement_report", "date": "2024-03-05", "ref": "document/r", "covers": ["m1"], "posted_on": posted}

site(papers) := {"documents": papers}

answers(dossier) := found if found := {[o.key, o.by] | some o in report_posted.obligations} with input as dossier

test_not_posted if {
	answers(site([report(null)])) == {["2024-03-05/m1", null]}
	count(report_posted.not_owed) == 0 with input as site([report(null)])
}

test_posted if answers(site([report("2024-03-20")])) == {["2024-03-05/m1", {"date": "2024-03-20", "ref": "document/r"}]}

test_not_owed if {
	every papers in [[object.union(report(null), {"date": "2023-06-15"})], [object.union(report(null), {"kind": "advice"})]] {
		answers(site(papers)) == set()
		count(report_posted.not_owed) == 1 with input as site(papers)
	}
}
