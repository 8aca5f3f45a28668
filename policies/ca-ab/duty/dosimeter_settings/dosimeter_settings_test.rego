package duty.dosimeter_settings_test

import data.duty.dosimeter_settings
import rego.v2

dose(threshold) := {"id": "m1", "date": "2024-03-05", "ref": "measurement/m1", "current": true, "dosed": true, "threshold_db": threshold}

values(list) := found if found := {o.value | some o in dosimeter_settings.obligations} with input as {"measurements": list}

test_threshold_is_handed_over if {
	values([dose(75)]) == {75}
	values([dose(null)]) == {null}
	count(dosimeter_settings.not_owed) == 0 with input as {"measurements": [dose(75)]}
}

test_not_owed if {
	every changes in [{"dosed": false}, {"current": false}] {
		values([object.union(dose(80), changes)]) == set()
		count(dosimeter_settings.not_owed) == 1 with input as {"measurements": [object.union(dose(80), changes)]}
	}
}
