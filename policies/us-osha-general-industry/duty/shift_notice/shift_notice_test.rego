package duty.shift_notice_test

import data.duty.shift_notice as duty
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

link := {"date": "2024-03-31", "ref": "notice/n1"}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_clock_starts_at_the_determination if {
	found := obligation(worker({"notice": link}))
	found.within == "shift_notice_time"
	found.after == "2024-03-10"
	found.by == link
	found.key == "a2"
	found.because == ["audiogram/a2", "audiogram/a2", "audiogram/a1", "notice/n1"]
}

test_no_letter if {
	found := obligation(worker({}))
	found.by == null
	found.note == "the test of 2024-03-01 shows a shift, of which the worker is to be informed in writing"
}

test_owed_although_a_physician_says_not_work_related if {
	obligation(worker({"not_work_related": {"date": "2024-03-12", "ref": "follow_up/f1"}})).by == null
}

test_owed_although_the_worker_left_the_program if obligation(worker({"still_enrolled": false})).by == null

test_telling_is_not_writing if {
	found := obligation(worker({"oral_notice": link}))
	found.by == null
	found.note == "the test of 2024-03-01 shows a shift, of which the worker was told, but not in writing"
}

test_notice_that_may_not_be_in_writing if {
	found := obligation(worker({"unclear_notice": link}))
	found.holds == null
	found.missing == ["whether the notice was in writing"]
	found.facts.told_on == "2024-03-31"
}

test_letter_beside_an_unclear_notice if obligation(worker({"notice": link, "unclear_notice": link})).by == link

test_determination_not_recorded if obligation(worker({"determined_on": null})).after == null

test_figures_only_under_health if {
	found := obligation(worker({}))
	found.health == {"left_db": 12}
	not "left_db" in object.keys(found.facts)
}

test_no_shift if {
	duty.obligations == set() with input as {"baseline": null, "shifts": []}
	count(duty.not_owed) == 1 with input as {"baseline": null, "shifts": []}
	duty.not_owed == set() with input as worker({})
}
