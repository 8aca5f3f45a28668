package duty.appointment_register_test

import data.duty.appointment_register
import rego.v2

worker(current, purpose) := {
	"employed": [{"from": "2020-01-01", "to": null, "current": current}],
	"examinations": [{"ref": "e1", "kind": "health_appointment", "purpose": purpose}, {"ref": "e2", "kind": "hearing_test", "purpose": null}],
}

holds(dossier) := found if found := {o.key: o.holds | some o in appointment_register.obligations} with input as dossier

test_with_its_occasion if {
	holds(worker(true, "periodic")) == {"e1": true}
	count(appointment_register.not_owed) == 0 with input as worker(true, "periodic")
}

test_without_its_occasion if holds(worker(true, null)) == {"e1": null}

test_kept_after_the_end if {
	some o in appointment_register.obligations with input as worker(false, "periodic")
	o.key == "deleted"
	o.holds == false
	o.because == ["e1"]
}

test_nothing_on_record if {
	empty := {"employed": [], "examinations": []}
	holds(empty) == {}
	count(appointment_register.not_owed) == 1 with input as empty
}
