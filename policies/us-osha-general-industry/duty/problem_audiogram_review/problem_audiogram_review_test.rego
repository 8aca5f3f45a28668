package duty.problem_audiogram_review_test

import data.duty.problem_audiogram_review as duty
import rego.v2

worker(change) := {"audiograms": [object.union(
	{
		"date": "2024-02-01",
		"ref": "audiogram/a2",
		"id": "a2",
		"enrolled": true,
		"invalidated": false,
		"replaced_by": null,
		"problem": "a threshold shift",
		"reviewed_on": null,
		"reviewer_is": null,
		"reviewer_named": false,
	},
	change,
)]}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_review_settles_it[profession] if {
	some profession in ["audiologist", "otolaryngologist", "physician"]
	obligation(worker({"reviewed_on": "2024-02-09", "reviewer_is": profession, "reviewer_named": true})).holds == true
}

test_technician_is_no_reviewer if {
	found := obligation(worker({"reviewed_on": "2024-02-09", "reviewer_is": "technician", "reviewer_named": true}))
	found.holds == false
	found.note == "the reviewer of the audiogram of 2024-02-01 is no audiologist, otolaryngologist or physician"
}

test_profession_not_known if {
	found := obligation(worker({"reviewed_on": "2024-02-09", "reviewer_named": true}))
	found.holds == null
	found.missing == ["profession of the reviewer"]
}

test_review_without_a_day if {
	found := obligation(worker({"reviewer_is": "audiologist", "reviewer_named": true}))
	found.holds == null
	found.missing == ["day of the review"]
}

test_not_reviewed if {
	found := obligation(worker({}))
	found.holds == false
	found.note == "the audiogram of 2024-02-01 shows a threshold shift, and no professional review is on record"
	found.facts.problem == "a threshold shift"
}

test_voided_by_a_professional if obligation(worker({"invalidated": true})).holds == true

test_no_problem[what] if {
	some what, change in {
		"nothing stands out": {"problem": null},
		"replaced by a retest": {"replaced_by": "audiogram/a3"},
		"not in the program": {"enrolled": false},
	}
	duty.obligations == set() with input as worker(change)
	duty.not_owed == {"no audiogram made while in the program stands out"} with input as worker(change)
}

test_no_audiogram if count(duty.not_owed) == 1 with input as {"audiograms": []}
