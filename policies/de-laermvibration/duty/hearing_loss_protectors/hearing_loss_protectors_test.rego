package duty.hearing_loss_protectors_test

import data.duty.hearing_loss_protectors
import rego.v2

worker(current, left, right, wear) := {
	"wear": wear, "exposed": {"upper_reached": [], "lower_reached": [{"from": "2024-01-01", "to": null, "current": current}]},
	"audiograms": [
		{"ref": "audiogram/a0", "invalidated": true, "schemes": {"hearing_damage": {"left": true, "right": true}}},
		{"ref": "audiogram/a1", "invalidated": false, "schemes": {"hearing_damage": {"left": left, "right": right}}},
	],
}

check(day, worn) := {"date": day, "ref": "wear_check/c1", "worn": worn}

holds(dossier) := found if found := {o.holds | some o in hearing_loss_protectors.obligations} with input as dossier

reasons(dossier) := found if found := hearing_loss_protectors.not_owed with input as dossier

test_seen_without if {
	some o in hearing_loss_protectors.obligations with input as worker(true, true, false, check("2024-05-02", false))
	o.holds == false
	o.because == ["audiogram/a1", "wear_check/c1"]
}

test_seen_with if {
	some o in hearing_loss_protectors.obligations with input as worker(true, false, true, check("2024-01-01", true))
	o.holds == true
	o.note == null
}

test_never_looked_at if {
	some o in hearing_loss_protectors.obligations with input as worker(true, true, true, check("2023-12-31", true))
	o.holds == null
	contains(o.note, "no check shows")
	count(o.missing) == 1
	count(reasons(worker(true, true, true, null))) == 0
}

test_at_the_upper_values_it_is_a_duty_of_all if {
	loud := object.union(worker(true, true, true, null), {"exposed": {"upper_reached": [{"from": "2024-01-01", "to": null, "current": true}]}})
	holds(loud) == set()
	count(reasons(loud)) == 1
}

test_no_damage_on_record if {
	holds(worker(true, false, null, null)) == set()
	count(reasons(worker(true, false, null, null))) == 1
	count(reasons(object.union(worker(true, true, true, null), {"audiograms": []}))) == 1
}

test_not_exposed_now if {
	holds(worker(false, true, true, null)) == set()
	count(reasons(worker(false, true, true, null))) == 1
}
