package duty.audiogram_compared_test

import data.duty.audiogram_compared as duty
import rego.v2

worker(change) := {
	"baseline": {"date": "2023-02-01", "ref": "audiogram/a1"},
	"audiograms": [object.union(
		{
			"date": "2024-02-01",
			"ref": "audiogram/a2",
			"id": "a2",
			"to_compare": true,
			"compared_on": null,
			"cannot_compare": [],
			"hearing": {"left_db": 5},
		},
		change,
	)],
}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_compared if {
	found := obligation(worker({"compared_on": "2024-02-09"}))
	found.holds == true
	found.key == "a2"
	found.facts.compared_on == "2024-02-09"
	found.health == {"left_db": 5}
	found.because == ["audiogram/a2", "audiogram/a1"]
}

test_not_compared if {
	found := obligation(worker({}))
	found.holds == false
	found.note == "no comparison of the audiogram of 2024-02-01 with the baseline is on record"
}

test_missing_threshold_gives_no_verdict if {
	found := obligation(worker({"compared_on": "2024-02-09", "cannot_compare": ["left 3000 Hz"]}))
	found.holds == null
	found.missing == ["left 3000 Hz"]
}

test_nothing_to_compare if {
	alone := worker({"to_compare": false})
	duty.obligations == set() with input as alone
	duty.not_owed == {"there is no later audiogram, while in the program, to compare with the baseline"} with input as alone
	count(duty.not_owed) == 1 with input as {"baseline": null, "audiograms": []}
}

test_without_baseline_the_test_alone_is_cited if {
	alone := object.union(worker({}), {"baseline": null})
	obligation(alone).because == ["audiogram/a2", null]
}
