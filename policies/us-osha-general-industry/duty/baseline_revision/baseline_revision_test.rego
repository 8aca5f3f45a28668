package duty.baseline_revision_test

import data.duty.baseline_revision as duty
import rego.v2

nobody := {"revisions": [], "persistent": [], "marked_later": []}

revised(change) := object.union(nobody, {"revisions": [object.union(
	{
		"date": "2024-05-01",
		"ref": "follow_up/f1",
		"audiogram": "audiogram/a3",
		"ears": ["left"],
		"unfounded": [],
		"undecided": [],
		"by": "audiologist",
		"by_recorded": true,
		"hearing": {"left_db": 12},
	},
	change,
)]})

shown_again(opinion) := object.union(nobody, {"persistent": [{
	"date": "2025-03-01",
	"ref": "audiogram/a3",
	"shift": {"date": "2024-03-01", "ref": "audiogram/a2"},
	"ears": "left",
	"opinion": opinion,
	"hearing": {"left_db": 12},
}]})

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_one_ear_revised if {
	found := obligation(revised({}))
	found.holds == true
	found.key == "revision/2024-05-01/left"
	found.because == ["follow_up/f1", "audiogram/a3"]
}

test_other_ear_moved_too if {
	found := obligation(revised({"ears": ["left", "right"], "unfounded": ["right"]}))
	found.holds == false
	found.key == "revision/2024-05-01/left+right"
	found.note == "the baseline was moved for an ear without shift or improvement: right"
}

test_technician_cannot_revise if {
	found := obligation(revised({"by": "technician"}))
	found.holds == false
	found.note == "who moved the baseline is no audiologist, otolaryngologist or physician: technician"
}

test_profession_not_known if {
	found := obligation(revised({"by": null}))
	found.holds == null
	found.missing == ["profession of who decided"]
}

test_thresholds_missing if {
	found := obligation(revised({"undecided": ["left"]}))
	found.holds == null
	found.missing == ["thresholds of the left ear"]
}

test_new_baseline_not_on_record if {
	found := obligation(revised({"audiogram": null}))
	found.holds == null
	found.missing == ["the audiogram that became the baseline"]
}

test_gap_counts_more_than_what_is_not_known if {
	obligation(revised({"by": null, "unfounded": ["left"]})).holds == false
}

test_shift_shown_again_asks_for_a_judgement if {
	found := obligation(shown_again(null))
	found.key == "persistence/2025-03-01/left"
	found.by == null
	found.of == "physician, otolaryngologist or audiologist"
	found.health == {"left_db": 12}
}

test_judgement_on_record if {
	obligation(shown_again({"date": "2025-03-09", "ref": "follow_up/f2"})).by.date == "2025-03-09"
}

test_later_test_marked_as_baseline if {
	found := obligation(object.union(nobody, {"marked_later": [{"date": "2024-05-01", "ref": "audiogram/a3"}]}))
	found.key == "marked/2024-05-01"
	found.note == "a later audiogram is marked as baseline without a decision to revise"
}

test_nothing_raises_the_question if {
	duty.obligations == set() with input as nobody
	duty.not_owed == {"no baseline was moved, and nothing raises the question"} with input as nobody
	duty.not_owed == set() with input as revised({})
	duty.not_owed == set() with input as shown_again(null)
}
