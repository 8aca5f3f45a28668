package duty.protectors_worn_test

import data.duty.protectors_worn
import rego.v2

worker(current, wear) := {
	"wear": wear, "protection": {"date": "2024-01-10", "ref": "protector_issue/p1"},
	"exposed": {"upper_reached": [{"from": "2024-01-01", "to": null, "current": current}]},
}

check(day, worn) := {"date": day, "ref": "wear_check/c1", "worn": worn}

holds(dossier) := found if found := {o.holds | some o in protectors_worn.obligations} with input as dossier

test_seen_without if {
	some o in protectors_worn.obligations with input as worker(true, check("2024-01-01", false))
	o.holds == false
	o.because == ["wear_check/c1"]
}

test_seen_with if {
	some o in protectors_worn.obligations with input as worker(true, check("2024-05-02", true))
	o.holds == true
	o.note == null
}

test_never_looked_at if {
	holds(worker(true, null)) == {null}
	holds(worker(true, check("2024-05-02", null))) == {null}
	count(protectors_worn.not_owed) == 0 with input as worker(true, null)
}

test_no_protector_is_another_finding if {
	without := object.union(worker(true, null), {"protection": null})
	holds(without) == set()
	count(protectors_worn.not_owed) == 1 with input as without
	holds(object.union(worker(true, check("2024-05-02", false)), {"protection": null})) == {false}
}

test_check_from_before_the_exposure if {
	some o in protectors_worn.obligations with input as worker(true, check("2023-12-31", true))
	o.holds == null
	o.because == []
	count(o.missing) == 1
}

test_not_compulsory_now if {
	holds(worker(false, check("2024-05-02", false))) == set()
	count(protectors_worn.not_owed) == 1 with input as worker(false, null)
}
