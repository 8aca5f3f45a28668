package duty.measures_after_report_test

import data.duty.measures_after_report
import rego.v2

done(kind, day, result) := {"date": day, "ref": sprintf("f-%s", [kind]), "kind": kind, "result": result}

report := done("medical_opinion", "2025-03-10", "measures_insufficient")

found(follow_ups) := by_key if by_key := {o.key: o.by | some o in measures_after_report.obligations} with input as {"examinations": [{"ref": "e1", "follow_ups": follow_ups}]}

test_nothing_done if {
	found([report, done("assessment_reviewed", "2025-03-09", null)]) == {
		"assessment of f-medical_opinion": null,
		"measures of f-medical_opinion": null,
		"report of f-medical_opinion": null,
	}
}

test_all_done if {
	o := found([report, done("assessment_reviewed", "2025-03-10", null), done("controls_reviewed", "2025-03-12", null), done("authority_report", "2025-03-20", null)])
	o["assessment of f-medical_opinion"].date == "2025-03-10"
	o["measures of f-medical_opinion"].ref == "f-controls_reviewed"
	o["report of f-medical_opinion"].date == "2025-03-20"
}

test_no_report if {
	found([done("medical_opinion", "2025-03-10", "not_work_related")]) == {}
	count(measures_after_report.not_owed) == 1 with input as {"examinations": []}
	count(measures_after_report.not_owed) == 0 with input as {"examinations": [{"ref": "e1", "follow_ups": [report]}]}
}
