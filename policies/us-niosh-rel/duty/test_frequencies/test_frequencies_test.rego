package duty.test_frequencies_test

import data.duty.test_frequencies as duty
import rego.v2

worker(change) := {
	"audiograms": [object.union(
		{
			"date": "2024-02-01",
			"ref": "audiogram/a2",
			"id": "a2",
			"in_program": true,
			"not_tested": [],
			"not_recorded": [],
		},
		change,
	)],
}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_complete if {
	found := obligation(worker({}))
	found.holds == true
	found.key == "a2"
}

test_frequency_left_out if {
	found := obligation(worker({"not_tested": ["right 6000 Hz"], "not_recorded": ["left 3000 Hz"]}))
	found.holds == false
	found.note == "the test of 2024-02-01 left out: right 6000 Hz"
	found.facts.not_tested == ["right 6000 Hz"]
}

test_record_says_nothing if {
	found := obligation(worker({"not_recorded": ["left 3000 Hz", "right 3000 Hz"]}))
	found.holds == null
	found.missing == ["left 3000 Hz", "right 3000 Hz"]
}

test_no_test_under_the_program[what] if {
	some what, w in {
		"no audiogram": {"audiograms": []},
		"made outside the program": worker({"in_program": false, "not_tested": ["left 500 Hz"]}),
	}
	duty.obligations == set() with input as w
	duty.not_owed == {"there is no audiogram under the program"} with input as w
}
