package duty.instruction_after_change_test

import data.duty.instruction_after_change
import rego.v2

group(current, raises, what) := {
	"exposed": {"lower_reached": [{"from": "2024-01-01", "to": null, "current": current}]},
	"changes": [{"id": "c1", "date": "2025-03-03", "ref": "change/c1", "what": what, "raises_exposure": raises}],
}

found(dossier) := notes if notes := {o.note | some o in instruction_after_change.obligations} with input as dossier

test_change_that_may_matter if {
	some o in instruction_after_change.obligations with input as group(true, null, "new hammer")
	o.after == "2025-03-03"
	o.by == "document.instruction"
	endswith(o.note, "new hammer")
	count(instruction_after_change.not_owed) == 0 with input as group(true, "yes", null)
}

test_what_was_changed_is_not_recorded if {
	some note in found(group(true, "unknown", null))
	endswith(note, "not recorded")
}

test_change_that_raises_nothing if {
	found(group(true, "no", null)) == set()
	count(instruction_after_change.not_owed) == 1 with input as group(true, "no", null)
}

test_not_exposed_now if {
	found(group(false, "yes", null)) == set()
	count(instruction_after_change.not_owed) == 1 with input as group(false, "yes", null)
}
