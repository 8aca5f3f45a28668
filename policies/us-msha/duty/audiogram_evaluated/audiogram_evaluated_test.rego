package duty.audiogram_evaluated_test

import data.duty.audiogram_evaluated
import rego.v2

worker(change) := {"audiograms": [object.union(
	{
		"id": "a2",
		"ref": "audiogram/a2",
		"date": "2024-03-05",
		"in_program": true,
		"reviewed_on": "2024-03-10",
		"reviewer_is": "audiologist",
		"reviewer_named": true,
		"hearing": null,
	},
	change,
)]}

obligation(dossier) := only if {
	all := audiogram_evaluated.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_evaluated if {
	every profession in ["physician", "otolaryngologist", "audiologist", "technician"] {
		found := obligation(worker({"reviewer_is": profession}))
		found.by == {"date": "2024-03-10", "ref": "audiogram/a2"}
		found.within == "results_time"
		found.after == "2024-03-05"
	}
}

test_not_evaluated if {
	found := obligation(worker({"reviewed_on": null, "reviewer_is": null, "reviewer_named": false}))
	found.by == null
	found.within == "results_time"
}

test_not_known_who_evaluated if obligation(worker({"reviewer_is": null})).holds == null

test_evaluated_by_somebody_else if obligation(worker({"reviewer_is": "licensed_professional"})).holds == false

test_no_test_under_the_program if {
	audiogram_evaluated.obligations == set() with input as worker({"in_program": false})
	count(audiogram_evaluated.not_owed) == 1 with input as worker({"in_program": false})
	count(audiogram_evaluated.not_owed) == 0 with input as worker({})
}

test_day_of_the_evaluation_not_recorded if {
	found := obligation(worker({"reviewed_on": null}))
	found.holds == null
	found.missing == ["the day of the evaluation"]
}

test_test_from_before_the_law_began if {
	count(audiogram_evaluated.obligations) == 0 with input as worker({"date": "2000-09-12"})
	count(audiogram_evaluated.not_owed) == 1 with input as worker({"date": "2000-09-12"})
	obligation(worker({"date": "2000-09-13"})).after == "2000-09-13"
}
