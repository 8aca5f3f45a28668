package duty.shift_protectors_test

import data.duty.shift_protectors as duty
import rego.v2

shift := {
	"date": "2024-03-01",
	"ref": "audiogram/a2",
	"id": "a2",
	"first_test": {"date": "2024-03-01", "ref": "audiogram/a2"},
	"ears": "left",
	"at_least": false,
	"age_corrected": false,
	"determined_on": "2024-03-10",
	"notice": null,
	"oral_notice": null,
	"unclear_notice": null,
	"had_protector": true,
	"fitting": null,
	"retraining": null,
	"not_work_related": null,
	"other_opinion": null,
	"referral_decision": null,
	"referral_decision_by": null,
	"referral_needed": null,
	"referral": null,
	"hearing": {"left_db": 12},
	"still_enrolled": true,
}

worker(change) := {
	"baseline": {"date": "2020-03-02", "ref": "audiogram/a1"},
	"shifts": [object.union(shift, change)],
}

done := {"date": "2024-03-20", "ref": "follow_up/f1"}

opinion := {"date": "2024-03-12", "ref": "follow_up/f9"}

by_key(w) := found if {
	found := {o.key: o | some o in duty.obligations} with input as w
}

test_nothing_done if {
	found := by_key(worker({}))
	object.keys(found) == {"a2/fitting", "a2/training"}
	found["a2/fitting"].by == null
	found["a2/fitting"].after == "2024-03-01"
	found["a2/fitting"].note == "after the shift of 2024-03-01 the worker is to be refitted with protectors"
	found["a2/training"].note == "after the shift of 2024-03-01 the worker is to be retrained in their use and care"
	not "within" in object.keys(found["a2/fitting"])
}

test_worker_without_protectors_is_fitted_and_trained if {
	found := by_key(worker({"had_protector": false}))
	found["a2/fitting"].note == "after the shift of 2024-03-01 the worker is to be fitted with protectors"
	found["a2/training"].note == "after the shift of 2024-03-01 the worker is to be trained in their use and care"
}

test_both_done if {
	found := by_key(worker({"fitting": done, "retraining": done}))
	found["a2/fitting"].by == done
	found["a2/training"].by == done
}

test_physician_lifts_it if {
	found := by_key(worker({"not_work_related": opinion}))
	object.keys(found) == {"a2"}
	found.a2.cite == "29 CFR 1910.95(g)(8)(ii)"
	found.a2.because == ["audiogram/a2", "follow_up/f9"]
	duty.not_owed == set() with input as worker({"not_work_related": opinion})
}

test_other_opinion_lifts_nothing if {
	found := by_key(worker({"other_opinion": opinion}))
	found["a2/fitting"].by == null
	endswith(found["a2/fitting"].note, "; the opinion on record is not known to be a physician's")
	found["a2/fitting"].because == ["audiogram/a2", "follow_up/f9"]
}

test_after_the_program_only_what_was_done_is_shown if {
	left := worker({"still_enrolled": false, "fitting": done})
	object.keys(by_key(left)) == {"a2/fitting"}
	duty.not_owed == set() with input as left
}

test_no_longer_in_the_program if {
	left := worker({"still_enrolled": false})
	duty.obligations == set() with input as left
	duty.not_owed == {"the worker is no longer in the program"} with input as left
}

test_no_shift if {
	duty.obligations == set() with input as {"shifts": []}
	count(duty.not_owed) == 1 with input as {"shifts": []}
}
