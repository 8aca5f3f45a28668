package duty.monitoring_observed_test

import data.duty.monitoring_observed
import rego.v2

group(invited) := {"measurements": [{"id": "m1", "ref": "measurement/m1", "date": "2024-03-05", "current": true, "observers_invited": invited}]}

obligation(invited) := o if some o in monitoring_observed.obligations with input as group(invited)

test_could_observe if {
	obligation(true).holds == true
	obligation(true).note == null
}

test_could_not_observe if {
	obligation(false).holds == false
	obligation(false).note != null
}

test_not_recorded if {
	obligation(null).holds == null
	count(obligation(null).missing) == 1
}

test_measurement_from_before_a_change_is_not_asked_about if {
	before := {"measurements": [object.union(group(false).measurements[0], {"current": false})]}
	count(monitoring_observed.obligations) == 0 with input as before
	count(monitoring_observed.not_owed) == 1 with input as before
}

test_never_measured if {
	count(monitoring_observed.obligations) == 0 with input as {"measurements": []}
	count(monitoring_observed.not_owed) == 1 with input as {"measurements": []}
	count(monitoring_observed.not_owed) == 0 with input as group(null)
}
