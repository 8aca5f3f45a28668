package duty.annual_audiogram_test

import data.duty.annual_audiogram as duty
import rego.v2

tested := {"from": "2020-03-02", "to": "2024-01-01", "current": false}

worker(stretches) := {"enrolled": [{"from": "2020-01-01", "to": "2024-01-01", "tested": stretch} | some stretch in stretches]}

test_after_the_baseline if {
	found := duty.obligations with input as worker([tested, null])
	found == {{"every": "audiogram_interval", "during": tested, "by": "audiogram.valid"}}
	duty.not_owed == set() with input as worker([tested, null])
}

test_no_baseline if {
	duty.obligations == set() with input as worker([null])
	duty.not_owed == {"there is no baseline yet"} with input as worker([null])
}

test_not_at_the_rel if {
	duty.obligations == set() with input as worker([])
	duty.not_owed == {"no stretch at or above the REL is known"} with input as worker([])
}
