package duty.hearing_loss_recorded_test

import data.duty.hearing_loss_recorded as duty
import rego.v2

worker(change) := {"recordables": [object.union(
	{
		"date": "2024-03-01",
		"ref": "audiogram/a2",
		"id": "a2",
		"ears": "left",
		"known_on": "2024-03-10",
		"retest_until": "2024-03-31",
		"retest": null,
		"entry": null,
		"removal": null,
		"work_related": null,
		"not_work_related": null,
		"other_opinion": null,
		"compared_with": "audiogram/a1",
		"hearing": {"left_level_db": 30},
	},
	change,
)]}

opinion := {"date": "2024-03-12", "ref": "follow_up/f1"}

entry := {"date": "2024-03-15", "ref": "follow_up/f2"}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_nobody_has_judged_work_relatedness if {
	found := obligation(worker({}))
	found.of == "physician or other licensed health care professional"
	found.note == "no opinion on work-relatedness is on record"
	found.because == ["audiogram/a2", "audiogram/a1"]
}

test_entered if {
	found := obligation(worker({"entry": entry}))
	found.within == "log_entry_time"
	found.after == "2024-03-10"
	found.no_sooner_than == "2024-03-31"
	found.by == entry
}

test_work_related_and_not_entered if {
	found := obligation(worker({"work_related": opinion}))
	found.by == null
	found.note == "the loss that the test of 2024-03-01 shows was found work-related"
}

test_confirmed_by_a_retest if {
	found := obligation(worker({
		"work_related": opinion,
		"entry": entry,
		"known_on": "2024-03-20",
		"retest_until": null,
		"retest": {"date": "2024-03-20", "ref": "audiogram/a3"},
	}))
	found.after == "2024-03-20"
	found.no_sooner_than == null
	found.because == ["audiogram/a2", "audiogram/a1", "audiogram/a3", "follow_up/f1", "follow_up/f2"]
}

test_not_work_related if {
	found := obligation(worker({"not_work_related": opinion}))
	found.cite == "29 CFR 1904.10(b)(6)"
	found.because == ["audiogram/a2", "audiogram/a1", "follow_up/f1"]
}

test_opinion_of_somebody_without_licence if {
	found := obligation(worker({"other_opinion": opinion}))
	found.note == "the opinion on record is not known to be a licensed professional's"
	not "lifted" in object.keys(found)
}

test_opinions_contradict if {
	found := obligation(worker({"work_related": opinion, "not_work_related": opinion}))
	found.note == "two opinions on work-relatedness contradict each other"
}

test_figures_only_under_health if {
	found := obligation(worker({}))
	found.health == {"left_level_db": 30}
	object.keys(found.facts) == {"ears", "compared_with", "retest_possible_until"}
}

test_nothing_to_record if {
	duty.obligations == set() with input as {"recordables": []}
	duty.not_owed == {"no audiogram meets the numbers of the recording rule"} with input as {"recordables": []}
	duty.not_owed == set() with input as worker({})
}
