package duty.measurement_conditions_test

import data.duty.measurement_conditions
import rego.v2

dose(threshold, upper) := {"threshold_db": threshold, "upper_db": upper}

measurement := {
	"id": "m1",
	"ref": "measurement/m1",
	"date": "2024-03-05",
	"dosed": true,
	"repeated": false,
	"full_shift": true,
	"reaches_enrolling": true,
	"method": "slow",
	"doses": [dose(80, 130), dose(90, 140)],
}

group(change) := {"measurements": [object.union(measurement, change)]}

by_key(dossier) := found if found := {o.key: o | some o in measurement_conditions.obligations} with input as dossier

test_right_settings if {
	found := by_key(group({}))
	object.keys(found) == {"m1/full shift", "m1/response", "m1/80 dBA/upper end", "m1/90 dBA/upper end", "m1/90 dBA/threshold"}
	found["m1/full shift"].holds == true
	found["m1/response"].holds == true
	found["m1/80 dBA/upper end"].value == 130
	found["m1/80 dBA/upper end"].at_least == "action_range_top"
	found["m1/90 dBA/upper end"].value == 140
	found["m1/90 dBA/upper end"].at_least == "limit_range_top"
	found["m1/90 dBA/threshold"].at_most == "limit_range_floor"
}

test_part_of_the_shift if {
	by_key(group({"full_shift": false}))["m1/full shift"].holds == false
	by_key(group({"full_shift": null}))["m1/full shift"].holds == true
	by_key(group({"full_shift": null, "reaches_enrolling": null}))["m1/full shift"].holds == null
}

test_response if {
	by_key(group({"method": "fast"}))["m1/response"].holds == false
	by_key(group({"method": "integrating"}))["m1/response"].holds == false
	by_key(group({"method": null}))["m1/response"].holds == null
	by_key(group({"method": null}))["m1/response"].missing == ["the response of the instrument"]
}

test_threshold_not_recorded if {
	found := by_key(group({"doses": [dose(null, 130)]}))
	object.keys(found) == {"m1/full shift", "m1/response", "m1/null dBA/threshold"}
	found["m1/null dBA/threshold"].value == null
	found["m1/null dBA/threshold"].missing == ["the integration threshold"]
}

test_upper_end_not_recorded if {
	by_key(group({"doses": [dose(80, null)]}))["m1/80 dBA/upper end"].missing == ["the upper end of the range"]
}

test_threshold_between_the_two_ranges if {
	found := by_key(group({"doses": [dose(85, 140)]}))
	found["m1/85 dBA/threshold"].value == 85
	found["m1/85 dBA/upper end"].at_least == "limit_range_top"
}

test_no_dose if {
	every change in [{"dosed": false}, {"repeated": true}] {
		by_key(group(change)) == {}
		count(measurement_conditions.not_owed) == 1 with input as group(change)
	}
	count(measurement_conditions.not_owed) == 1 with input as {"measurements": []}
	count(measurement_conditions.not_owed) == 0 with input as group({})
}
