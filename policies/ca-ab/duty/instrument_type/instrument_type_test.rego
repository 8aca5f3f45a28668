package duty.instrument_type_test

import data.duty.instrument_type
import rego.v2

meter(class) := {
	"as_of": "2026-06-30", "kind": "dosimeter", "class": class,
	"noise_measurements": [{"ref": "measurement/m1"}],
}

holds(dossier) := found if found := {o.holds | some o in instrument_type.obligations} with input as dossier

test_type if {
	holds(meter("2")) == {true}
	holds(meter("1")) == {true}
	holds(meter("3")) == {false}
	holds(meter(null)) == {null}
	holds(object.union(meter("2"), {"kind": null})) == {true}
	count(instrument_type.not_owed) == 0 with input as meter("2")
}

test_not_owed if {
	every changes in [{"kind": "audiometer"}, {"kind": "calibrator"}, {"noise_measurements": []}] {
		holds(object.union(meter("3"), changes)) == set()
		count(instrument_type.not_owed) == 1 with input as object.union(meter("3"), changes)
	}
}
