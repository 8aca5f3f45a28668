package duty.test_frequencies_test

import data.duty.test_frequencies as duty
import rego.v2

audiogram(not_tested, not_recorded) := {
	"id": "a1", "ref": "audiogram/a1", "date": "2024-05-02", "in_program": true,
	"not_tested": not_tested, "not_recorded": not_recorded,
}

holds(tests) := found if found := {o.holds | some o in duty.obligations} with input as {"audiograms": tests}

test_all_tested if holds([audiogram([], [])]) == {true}

test_left_out if {
	holds([audiogram(["left 8000 Hz"], ["right 8000 Hz"])]) == {false}
	some o in duty.obligations with input as {"audiograms": [audiogram(["left 8000 Hz"], [])]}
	o.note == "the exam of 2024-05-02 left out: left 8000 Hz"
}

test_not_recorded if {
	holds([audiogram([], ["right 8000 Hz"])]) == {null}
	some o in duty.obligations with input as {"audiograms": [audiogram([], ["right 8000 Hz"])]}
	o.missing == ["right 8000 Hz"]
}

test_outside_the_program if {
	outside := object.union(audiogram(["left 8000 Hz"], []), {"in_program": false})
	holds([outside]) == set()
	reasons := duty.not_owed with input as {"audiograms": [outside]}
	count(reasons) == 1
}
