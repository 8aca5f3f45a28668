package duty.noise_ceiling_test

import data.duty.noise_ceiling as duty
import rego.v2

measurement(change) := object.union(
	{"id": "m1", "date": "2024-03-01", "ref": "measurement/m1", "current": true, "max_dba": null, "peak_db": null, "peak_weighting": null, "reaches_enrolling": true},
	change,
)

group(impulsive, changes) := {"impulsive": impulsive, "workers": 4, "measurements": [measurement(change) | some change in changes]}

by_key(g) := found if found := {o.key: o | some o in duty.obligations} with input as g

test_highest_level_handed_over if {
	found := by_key(group(false, [{"max_dba": 140, "reaches_enrolling": false}]))
	object.keys(found) == {"m1"}
	found.m1.value == 140
	found.m1.at_most == "noise_ceiling"
	found.m1.missing == []
	found.m1.note == "highest level measured on 2024-03-01"
}

test_level_not_recorded if {
	found := by_key(group(null, [{}]))
	object.keys(found) == {"m1"}
	found.m1.value == null
	found.m1.missing == ["the highest level"]
	found.m1.note == "the measurement of 2024-03-01 reaches the REL and does not give the highest level"
}

test_peak_of_impulses if {
	found := by_key(group(true, [{"max_dba": 110}]))
	found["m1/peak"].value == null
	found["m1/peak"].missing == ["the peak level"]
	known := by_key(group(true, [{"max_dba": 110, "peak_db": 141, "peak_weighting": "C"}]))
	known["m1/peak"].value == 141
	known["m1/peak"].at_most == "peak_ceiling"
	known["m1/peak"].facts.weighting == "C"
}

test_a_peak_on_record_counts_without_impulses if {
	found := by_key(group(null, [{"peak_db": 141, "reaches_enrolling": null}]))
	found["m1/peak"].value == 141
	found.m1.value == null
}

test_not_owed[what] if {
	some what, change in {
		"quiet": {"reaches_enrolling": false},
		"not known": {"reaches_enrolling": null},
		"measured again since a change": {"current": false, "max_dba": 150},
	}
	g := group(true, [change])
	duty.obligations == set() with input as g
	count(duty.not_owed) == 1 with input as g
}

test_owed_and_so_not_silent if duty.not_owed == set() with input as group(true, [{}])
