package duty.shift_not_persistent_notice_test

import data.duty.shift_not_persistent_notice as duty
import rego.v2

worker(change) := {"lapsed": [object.union(
	{
		"date": "2025-03-01",
		"ref": "audiogram/a3",
		"id": "a3",
		"shift": {"date": "2024-03-01", "ref": "audiogram/a2"},
		"ears": "left",
		"below_limit": true,
		"notice": null,
	},
	change,
)]}

told := {"date": "2025-03-09", "ref": "notice/n1"}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_not_told if {
	found := obligation(worker({}))
	found.key == "a3/a2"
	found.after == "2025-03-01"
	found.by == null
	found.note == "the test of 2025-03-01 no longer shows the shift of 2024-03-01, and the worker is to be told"
}

test_told if {
	found := obligation(worker({"notice": told}))
	found.by == told
	found.because == ["audiogram/a2", "audiogram/a3", "notice/n1"]
}

test_exposure_on_that_day_not_known if {
	found := obligation(worker({"below_limit": null}))
	found.holds == null
	count(found.missing) == 1
}

test_above_the_limit_nothing_is_asked if {
	loud := worker({"below_limit": false})
	duty.obligations == set() with input as loud
	duty.not_owed == {"exposure was above the limit on the day of the later test"} with input as loud
}

test_no_later_test if {
	duty.obligations == set() with input as {"lapsed": []}
	duty.not_owed == {"no later test shows that a shift did not persist"} with input as {"lapsed": []}
}
