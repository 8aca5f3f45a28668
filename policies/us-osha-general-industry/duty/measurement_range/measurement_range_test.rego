package duty.measurement_range_test

import data.duty.measurement_range
import rego.v2

measurement(threshold, upper) := {
	"id": "m1", "ref": "measurement/m1", "date": "2024-03-05", "dosed": true, "repeated": false,
	"threshold_db": threshold, "upper_db": upper, "instrument": "D1",
}

limits(measurements) := found if found := {[o.key, o.value] | some o in measurement_range.obligations} with input as {"measurements": measurements}

test_both_ends_are_limits if {
	limits([measurement(80, 130)]) == {["m1/threshold", 80], ["m1/upper end", 130]}
	some threshold in measurement_range.obligations with input as {"measurements": [measurement(80, 130)]}
	threshold.at_most == "integration_floor"
	some upper in measurement_range.obligations with input as {"measurements": [measurement(80, 130)]}
	upper.at_least == "integration_top"
}

test_settings_not_recorded if {
	limits([measurement(null, null)]) == {["m1/threshold", null], ["m1/upper end", null]}
	every o in measurement_range.obligations { count(o.missing) == 1 } with input as {"measurements": [measurement(null, null)]}
}

test_recorded_settings_lack_nothing if {
	every o in measurement_range.obligations { o.missing == [] } with input as {"measurements": [measurement(90, 115)]}
}

test_no_dose if {
	level_only := object.union(measurement(null, null), {"dosed": false})
	limits([level_only]) == set()
	count(measurement_range.not_owed) == 1 with input as {"measurements": [level_only]}
}

test_dose_taken_again_decides_nothing if {
	again := object.union(measurement(90, 115), {"repeated": true})
	limits([again, measurement(80, 130)]) == {["m1/threshold", 80], ["m1/upper end", 130]}
}

test_no_measurement if count(measurement_range.not_owed) == 1 with input as {"measurements": []}

test_owed_as_soon_as_one_dose_was_taken if {
	count(measurement_range.not_owed) == 0 with input as {"measurements": [measurement(80, 130)]}
}
