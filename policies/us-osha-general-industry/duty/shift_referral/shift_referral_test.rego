package duty.shift_referral_test

import data.duty.shift_referral as duty
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

decided := {"date": "2024-03-12", "ref": "follow_up/f1"}

referred := {"date": "2024-03-20", "ref": "follow_up/f2"}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_nobody_has_decided if {
	found := obligation(worker({}))
	found.of == "physician, otolaryngologist or audiologist"
	found.note == "no professional's decision on a referral is on record"
	found.key == "a2"
}

test_decided_by_a_technician if {
	found := obligation(worker({
		"referral_decision": decided,
		"referral_decision_by": "technician",
		"referral_needed": false,
	}))
	found.ask == obligation(worker({})).ask
	found.note == "who decided on the referral is not an audiologist, otolaryngologist or physician"
}

test_profession_not_known if {
	found := obligation(worker({"referral_decision": decided, "referral_needed": false}))
	found.holds == null
	found.missing == ["profession of who decided on the referral"]
}

test_outcome_not_known if {
	found := obligation(worker({"referral_decision": decided, "referral_decision_by": "audiologist"}))
	found.holds == null
	found.missing == ["outcome of the decision on a referral"]
}

test_no_referral_needed if {
	found := obligation(worker({
		"referral_decision": decided,
		"referral_decision_by": "audiologist",
		"referral_needed": false,
	}))
	found.holds == true
	found.because == ["audiogram/a2", "follow_up/f1"]
}

test_referral_needed_and_made if {
	found := obligation(worker({
		"referral_decision": decided,
		"referral_decision_by": "physician",
		"referral_needed": true,
		"referral": referred,
	}))
	found.after == "2024-03-12"
	found.by == referred
}

test_referral_needed_and_not_made if {
	found := obligation(worker({
		"referral_decision": decided,
		"referral_decision_by": "physician",
		"referral_needed": true,
	}))
	found.by == null
	found.note == "a professional decided on 2024-03-12 that a referral is needed"
}

test_referred_without_more_ado if obligation(worker({"referral": referred})).holds == true

test_physician_lifts_it if {
	found := obligation(worker({"not_work_related": {"date": "2024-03-12", "ref": "follow_up/f9"}}))
	found.cite == "29 CFR 1910.95(g)(8)(ii)"
}

test_no_longer_in_the_program if {
	left := worker({"still_enrolled": false})
	duty.obligations == set() with input as left
	duty.not_owed == {"the worker is no longer in the program"} with input as left
}

test_decision_outlives_the_program if {
	left := worker({
		"still_enrolled": false,
		"referral_decision": decided,
		"referral_decision_by": "physician",
		"referral_needed": true,
	})
	obligation(left).by == null
	duty.not_owed == set() with input as left
}

test_no_shift if {
	duty.obligations == set() with input as {"shifts": []}
	count(duty.not_owed) == 1 with input as {"shifts": []}
}
