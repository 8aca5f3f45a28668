package duty.baseline_revision_test

import data.duty.baseline_revision
import rego.v2

nobody := {"revisions": [], "persistent": [], "audiograms": []}

revision := {
	"date": "2024-05-01",
	"ref": "follow_up/f1",
	"audiogram": "audiogram/a3",
	"ears": ["left"],
	"unfounded": [],
	"undecided": [],
	"result": "persistent",
	"by": "audiologist",
	"by_recorded": true,
	"hearing": {"left_db": 12},
}

revised(change) := object.union(nobody, {"revisions": [object.union(revision, change)]})

opinion(result, by) := {"date": "2024-04-20", "ref": "follow_up/f0", "kind": "persistence_opinion", "result": result, "by_is": by}

judged(result, by) := object.union(nobody, {"audiograms": [{"id": "a3", "follow_ups": [opinion(result, by)]}]})

shown_again(answer) := object.union(nobody, {"persistent": [{
	"date": "2025-03-01",
	"ref": "audiogram/a3",
	"shift": {"date": "2024-03-01", "ref": "audiogram/a2"},
	"ears": "left",
	"opinion": answer,
	"hearing": {"left_db": 12},
}]})

obligation(dossier) := only if {
	all := baseline_revision.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_one_ear_revised if {
	found := obligation(revised({}))
	found.holds == true
	found.key == "revision/2024-05-01/left"
	found.facts.reason == "persistent"
	found.because == ["follow_up/f1", "audiogram/a3"]
}

test_other_ear_moved_too if {
	found := obligation(revised({"ears": ["left", "right"], "unfounded": ["right"]}))
	found.holds == false
	found.note == "the baseline was moved for an ear without shift or improvement: right"
}

test_technician_cannot_revise if {
	found := obligation(revised({"by": "technician"}))
	found.holds == false
	found.note == "who moved the baseline is no physician or audiologist: technician"
}

test_what_the_records_lack if {
	obligation(revised({"by": null})).missing == ["profession of who decided"]
	obligation(revised({"undecided": ["left"]})).missing == ["thresholds of the left ear"]
	obligation(revised({"audiogram": null})).missing == ["the audiogram that became the baseline"]
	obligation(revised({"result": null})).missing == ["the reason, persistent or improved"]
	obligation(revised({"result": "other"})).holds == null
}

test_shift_shown_again_asks_for_a_judgement if {
	found := obligation(shown_again(null))
	found.key == "permanence/2025-03-01/left"
	found.by == null
	obligation(shown_again({"date": "2025-03-09", "ref": "follow_up/f2"})).by.date == "2025-03-09"
}

test_judged_permanent_and_not_revised if {
	every result in ["persistent", "improved"] {
		found := obligation(judged(result, "physician"))
		found.key == "judged/2024-04-20"
		found.by == null
	}
}

test_judged_permanent_and_revised if {
	both := object.union(judged("persistent", "physician"), {"revisions": [revision]})
	some o in baseline_revision.obligations with input as both
	o.key == "judged/2024-04-20"
	o.by == {"date": "2024-05-01", "ref": "follow_up/f1"}
}

test_other_judgements_ask_for_nothing if {
	every dossier in [judged("not_persistent", "physician"), judged("persistent", "technician")] {
		baseline_revision.obligations == set() with input as dossier
		count(baseline_revision.not_owed) == 1 with input as dossier
	}
}

test_new_baseline_after_an_absence_is_another_matter if {
	baseline_revision.obligations == set() with input as revised({"result": "new_baseline"})
	count(baseline_revision.not_owed) == 1 with input as revised({"result": "new_baseline"})
}

test_nothing_raises_the_question if {
	count(baseline_revision.not_owed) == 1 with input as nobody
	count(baseline_revision.not_owed) == 0 with input as revised({})
	count(baseline_revision.not_owed) == 0 with input as shown_again(null)
	count(baseline_revision.not_owed) == 0 with input as judged("persistent", "physician")
}

test_judged_by_who_is_not_known if {
	unknown := judged("persistent", null)
	found := obligation(unknown)
	found.holds == null
	found.key == "judged/2024-04-20"
	found.missing == ["the profession of who judged it"]
	count(baseline_revision.not_owed) == 0 with input as unknown
	obligation(object.union(unknown, {"revisions": [revision]})).key == "revision/2024-05-01/left"
	"ask" in object.keys(obligation(object.union(unknown, {"persistent": shown_again(null).persistent})))
}
