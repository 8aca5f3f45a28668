package duty.annual_test_offered_test

import data.duty.annual_test_offered
import rego.v2

after_baseline := {"from": "2021-03-01", "to": null, "current": true}

worker(tested) := {"enrolled": [{"from": "2021-01-01", "to": null, "current": true, "tested": tested}]}

test_every_twelve_months_after_the_baseline if {
	expected := {{"every": "annual_interval", "during": after_baseline, "by": "test.offered"}}
	annual_test_offered.obligations == expected with input as worker(after_baseline)
	count(annual_test_offered.not_owed) == 0 with input as worker(after_baseline)
}

test_no_baseline_yet if {
	annual_test_offered.obligations == set() with input as worker(null)
	annual_test_offered.not_owed == {"there is no baseline yet"} with input as worker(null)
}

test_never_exposed if {
	annual_test_offered.obligations == set() with input as {"enrolled": []}
	annual_test_offered.not_owed == {"no stretch at or above the action level is known"} with input as {"enrolled": []}
}
