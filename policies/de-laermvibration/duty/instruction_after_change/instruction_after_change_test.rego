package duty.instruction_after_change_test

import data.duty.instruction_after_change
import rego.v2

group(current, raises, what) := {
	"documents": [],
	"exposed": {"lower_reached": [{"from": "2024-01-01", "to": null, "current": current}]},
	"changes": [{"id": "c1", "date": "2025-03-03", "ref": "change/c1", "what": what, "raises_exposure": raises}],
}

found(dossier) := notes if notes := {o.note | some o in instruction_after_change.obligations} with input as dossier

test_change_that_may_matter if {
	some o in instruction_after_change.obligations with input as group(true, "yes", "new hammer")
	o.after == "2025-03-03"
	o.by == "document.instruction"
	endswith(o.note, "new hammer")
	count(instruction_after_change.not_owed) == 0 with input as group(true, "yes", null)
}

test_nobody_has_said_what_the_change_does if {
	every raises in ["unknown", null] {
		some o in instruction_after_change.obligations with input as group(true, raises, "new hammer")
		o.holds == null
		count(o.missing) == 1
	}
	instructed := object.union(group(true, null, "new hammer"), {"documents": [{"kind": "instruction", "date": "2025-03-04", "ref": "document/d1"}]})
	some o in instruction_after_change.obligations with input as instructed
	o.by == "document.instruction"
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
