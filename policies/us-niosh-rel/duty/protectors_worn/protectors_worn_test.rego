package duty.protectors_worn_test

import data.duty.protectors_worn as duty
import rego.v2

now := {"from": "2024-01-01", "to": null, "current": true}

check(worn) := {"date": "2024-05-01", "ref": "wear_check/1", "worn": worn, "own": true}

worker(wear) := {"enrolled": [now], "wear": wear}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_outcome_handed_over[worn] if {
	some worn in [true, false]
	found := obligation(worker(check(worn)))
	found.holds == worn
	found.on == "2024-05-01"
	found.missing == []
}

test_outcome_not_recorded if {
	found := obligation(worker(check(null)))
	found.holds == null
	found.missing == ["the outcome of the check"]
}

test_no_check_since if {
	every wear in [null, object.union(check(true), {"date": "2023-12-31"})] {
		obligation(worker(wear)).missing == ["a check of whether protectors are worn"]
	}
	obligation(worker(object.union(check(true), {"date": "2024-01-01"}))).holds == true
}

test_not_owed if {
	w := {"enrolled": [object.union(now, {"current": false, "to": "2025-01-01"})], "wear": check(false)}
	duty.obligations == set() with input as w
	count(duty.not_owed) == 1 with input as w
	count(duty.not_owed) == 0 with input as worker(null)
}
