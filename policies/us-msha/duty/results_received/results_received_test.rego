package duty.results_received_test

import data.duty.results_received
import rego.v2

worker(change) := {"audiograms": [object.union(
	{
		"id": "a2",
		"ref": "audiogram/a2",
		"date": "2024-03-05",
		"enrolled": true,
		"in_program": true,
		"invalidated": false,
		"received_on": null,
		"reviewed_on": null,
		"reviewer_named": false,
	},
	change,
)]}

obligation(dossier) := only if {
	all := results_received.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_received if {
	found := obligation(worker({"received_on": "2024-04-04"}))
	found.by == {"date": "2024-04-04", "ref": "audiogram/a2"}
	found.within == "results_time"
}

test_not_received if obligation(worker({})).by == null

test_invalid_tests_count if obligation(worker({"in_program": false, "invalidated": true})).by == null

test_no_test_under_the_program if {
	every change in [{"in_program": false}, {"in_program": false, "invalidated": true, "enrolled": false}] {
		results_received.obligations == set() with input as worker(change)
		count(results_received.not_owed) == 1 with input as worker(change)
	}
	count(results_received.not_owed) == 0 with input as worker({})
}

test_evaluated_and_day_of_receipt_not_recorded if {
	every change in [{"reviewed_on": "2024-03-10"}, {"reviewer_named": true}] {
		found := obligation(worker(change))
		found.holds == null
		found.missing == ["the day on which the result was received"]
	}
}

test_test_from_before_the_law_began if {
	count(results_received.obligations) == 0 with input as worker({"date": "2000-09-12"})
	count(results_received.not_owed) == 1 with input as worker({"date": "2000-09-12"})
	obligation(worker({"date": "2000-09-13"})).by == null
}
