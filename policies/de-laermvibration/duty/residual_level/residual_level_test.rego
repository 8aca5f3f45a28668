package duty.residual_level_test

import data.duty.residual_level
import rego.v2

worker(current, protection) := {
	"protection": protection,
	"exposed": {"lower_exceeded": [{"from": "2024-01-01", "to": null, "current": current}]},
}

muff(under) := {"ref": "protector_issue/p1", "protector": "p1", "under_db": under, "missing": ["H of the protector p1"], "working": "98 - 17 = 81 dBA"}

values(dossier) := found if found := {o.key: o.value | some o in residual_level.obligations} with input as dossier

test_both_ends_are_compared if {
	values(worker(true, muff(81))) == {"not too loud": 81, "not too quiet": 81}
	{o.at_most | some o in residual_level.obligations; o.at_most} == {"residual_top"} with input as worker(true, muff(81))
	{o.at_least | some o in residual_level.obligations; o.at_least} == {"residual_floor"} with input as worker(true, muff(81))
	every o in residual_level.obligations {
		o.missing == []
	} with input as worker(true, muff(81))
}

test_no_estimate if {
	some o in residual_level.obligations with input as worker(true, muff(null))
	values(worker(true, muff(null))) == {"not too loud": null}
	o.value == null
	o.missing == ["H of the protector p1"]
}

test_no_protector if {
	values(worker(true, null)) == {}
	count(residual_level.not_owed) == 1 with input as worker(true, null)
}

test_not_above_now if {
	values(worker(false, muff(81))) == {}
	count(residual_level.not_owed) == 1 with input as worker(false, muff(81))
}
