package duty.protectors_available_test

import data.duty.protectors_available
import rego.v2

worker(current, protection) := {
	"protection": protection,
	"exposed": {"lower_exceeded": [{"from": "2024-01-01", "to": null, "current": current}]},
}

muff := {"date": "2024-01-10", "ref": "protector_issue/p1"}

holds(dossier) := found if found := {o.holds | some o in protectors_available.obligations} with input as dossier

test_none_at_hand if {
	some o in protectors_available.obligations with input as worker(true, null)
	o.holds == false
	o.facts.above_since == "2024-01-01"
	count(protectors_available.not_owed) == 0 with input as worker(true, null)
}

test_at_hand if {
	some o in protectors_available.obligations with input as worker(true, muff)
	o.holds == true
	o.note == null
	o.because == ["protector_issue/p1"]
}

test_not_above_now if {
	holds(worker(false, null)) == set()
	count(protectors_available.not_owed) == 1 with input as worker(false, null)
}
