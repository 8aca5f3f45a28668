package duty.report_stays_posted_test

import data.duty.report_stays_posted
import rego.v2

report(to) := {
	"kind": "noise_measurement_report", "date": "2024-03-05", "ref": "document/r", "covers": [],
	"posted_on": "2024-03-06", "posted_to": to, "post_until": "2024-06-05",
}

holds(dossier) := found if found := {[o.key, o.holds] | some o in report_stays_posted.obligations} with input as dossier

test_still_up if {
	holds({"documents": [report(null)]}) == {["2024-03-05", true]}
	count(report_stays_posted.not_owed) == 0 with input as {"documents": [report(null)]}
}

test_taken_down if {
	holds({"documents": [report("2024-06-04")]}) == {["2024-03-05", false]}
	holds({"documents": [report("2024-06-05")]}) == {["2024-03-05", true]}
}

test_not_owed if {
	every paper in [object.union(report(null), {"post_until": null}), object.union(report(null), {"date": "2023-06-15"}), object.union(report(null), {"kind": "advice"})] {
		holds({"documents": [paper]}) == set()
		count(report_stays_posted.not_owed) == 1 with input as {"documents": [paper]}
	}
}
