package duty.assessment_updated_test

import data.duty.assessment_updated
import rego.v2

change(raises, what) := {"id": "c1", "date": "2025-03-03", "ref": "change/c1", "what": what, "raises_exposure": raises}

paper(day, reviewed) := {"kind": "risk_assessment", "date": day, "ref": "document/d1", "reviewed_on": reviewed}

group(changes) := {
	"changes": changes, "suspected_noisy": true, "exposed": {"lower_reached": []},
	"documents": [paper("2024-01-08", null)],
}

test_change_that_may_matter if {
	some o in assessment_updated.obligations with input as group([change("yes", "new hammer")])
	o.after == "2025-03-03"
	o.by == "document.risk_assessment"
	endswith(o.note, "new hammer")
	count(assessment_updated.not_owed) == 0 with input as group([change("yes", null)])
}

test_nobody_has_said_what_the_change_does if {
	every raises in ["unknown", null] {
		some o in assessment_updated.obligations with input as group([change(raises, "new hammer")])
		o.holds == null
		endswith(o.note, "new hammer")
		count(o.missing) == 1
	}
}

test_reviewed_since if {
	every document in [paper("2025-03-03", null), paper("2024-01-08", "2025-04-01")] {
		some o in assessment_updated.obligations with input as object.union(group([change(null, "new hammer")]), {"documents": [document]})
		o.by == "document.risk_assessment"
	}
}

test_no_assessment_or_no_noise if {
	every changes in [{"documents": []}, {"suspected_noisy": false}] {
		dossier := object.union(group([change("yes", null)]), changes)
		count(assessment_updated.obligations) == 0 with input as dossier
		count(assessment_updated.not_owed) == 1 with input as dossier
	}
	loud := object.union(group([change("yes", null)]), {"suspected_noisy": false, "exposed": {"lower_reached": [{"from": "2025-03-03", "to": null, "current": true}]}})
	count(assessment_updated.obligations) == 1 with input as loud
}

test_what_was_changed_is_not_recorded if {
	some o in assessment_updated.obligations with input as group([change("yes", null)])
	endswith(o.note, "not recorded")
}

test_change_that_raises_nothing if {
	found := assessment_updated.obligations with input as group([change("no", "quieter fan")])
	count(found) == 0
	count(assessment_updated.not_owed) == 1 with input as group([change("no", "quieter fan")])
}
