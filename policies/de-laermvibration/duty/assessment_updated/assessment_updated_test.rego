package duty.assessment_updated_test

import data.duty.assessment_updated
import rego.v2

change(raises, what) := {"id": "c1", "date": "2025-03-03", "ref": "change/c1", "what": what, "raises_exposure": raises}

group(changes) := {"changes": changes}

test_change_that_may_matter if {
	every raises in ["yes", "unknown", null] {
		some o in assessment_updated.obligations with input as group([change(raises, "new hammer")])
		o.after == "2025-03-03"
		o.by == "document.risk_assessment"
		endswith(o.note, "new hammer")
	}
	count(assessment_updated.not_owed) == 0 with input as group([change("yes", null)])
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
