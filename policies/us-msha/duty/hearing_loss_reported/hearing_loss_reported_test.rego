package duty.hearing_loss_reported_test

import data.duty.hearing_loss_reported
import rego.v2

done(kind, result, by) := {"date": "2024-03-20", "ref": sprintf("follow_up/%s", [kind]), "kind": kind, "result": result, "by_is": by}

audiogram(id, day, left, right) := {
	"id": id,
	"ref": sprintf("audiogram/%s", [id]),
	"date": day,
	"received_on": "2024-03-12",
	"to_compare": true,
	"replaced_by": null,
	"retest_of": null,
	"cannot_compare": [],
	"schemes": {"reportable": {"left": left, "right": right}},
	"follow_ups": [],
	"hearing": null,
}

worker(tests) := {"audiograms": tests, "revisions": []}

loss(change) := object.union(audiogram("a2", "2024-03-05", true, false), change)

obligation(dossier) := only if {
	all := hearing_loss_reported.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_not_reported if {
	found := obligation(worker([loss({})]))
	found.by == null
	found.after == "2024-03-12"
	found.within == "report_time"
	found.facts.ears == ["left"]
}

test_reported if {
	found := obligation(worker([loss({"follow_ups": [done("authority_report", null, null)]})]))
	found.by == {"date": "2024-03-20", "ref": "follow_up/authority_report"}
}

test_result_not_received if {
	obligation(worker([loss({"received_on": null})])).missing == ["the day on which the result was received"]
}

test_not_work_related if {
	found := obligation(worker([loss({"follow_ups": [done("medical_opinion", "not_work_related", "audiologist")]})]))
	found.cite == "30 CFR 62.175(b)"
	found.because == ["audiogram/a2", "follow_up/medical_opinion"]
}

test_other_opinions_lift_nothing if {
	every opinion in [done("medical_opinion", "not_work_related", "technician"), done("medical_opinion", "work_related", "physician"), done("referral", "not_work_related", "physician")] {
		obligation(worker([loss({"follow_ups": [opinion]})])).by == null
	}
}

test_retest_stands_in_for_its_test if {
	first := loss({"replaced_by": "audiogram/a3", "follow_ups": [done("authority_report", null, null)]})
	retest := object.union(audiogram("a3", "2024-04-02", true, true), {"retest_of": "audiogram/a2"})
	found := obligation(worker([first, retest]))
	found.key == "a3"
	found.facts.ears == ["left", "right"]
	found.by.ref == "follow_up/authority_report"
}

test_same_loss_again_is_not_reported_again if {
	again := audiogram("a3", "2025-03-05", true, false)
	obligation(worker([loss({}), again])).key == "a2"
	{o.key | some o in hearing_loss_reported.obligations} == {"a2", "a3"} with input as worker([loss({}), audiogram("a3", "2025-03-05", true, true)])
}

test_loss_found_unrelated_is_asked_about_again if {
	before := loss({"follow_ups": [done("medical_opinion", "not_work_related", "physician")]})
	{o.key | some o in hearing_loss_reported.obligations} == {"a2", "a3"} with input as worker([before, audiogram("a3", "2025-03-05", true, false)])
}

test_not_known if {
	found := obligation(worker([object.union(audiogram("a2", "2024-03-05", null, false), {"cannot_compare": ["left 3000 Hz"]})]))
	found.holds == null
	found.missing == ["left 3000 Hz"]
	obligation(worker([audiogram("a2", "2024-03-05", false, null)])).missing == ["thresholds from which the average change follows"]
}

test_new_baseline_after_an_absence_shows_no_loss if {
	anew := object.union(worker([loss({})]), {"revisions": [{"audiogram": "audiogram/a2", "result": "new_baseline"}]})
	hearing_loss_reported.obligations == set() with input as anew
	count(hearing_loss_reported.not_owed) == 1 with input as anew
}

test_other_ear_not_known_after_a_loss_that_was_reported if {
	later := worker([loss({}), audiogram("a3", "2025-03-05", true, null)])
	some o in hearing_loss_reported.obligations with input as later
	o.key == "a3"
	o.holds == null
}

test_loss_of_one_ear_is_one_matter_where_the_other_is_not_known if {
	obligation(worker([audiogram("a2", "2024-03-05", true, null)])).within == "report_time"
}

test_no_loss if {
	every test in [audiogram("a2", "2024-03-05", false, false), loss({"to_compare": false})] {
		hearing_loss_reported.obligations == set() with input as worker([test])
		count(hearing_loss_reported.not_owed) == 1 with input as worker([test])
	}
	count(hearing_loss_reported.not_owed) == 1 with input as worker([])
	count(hearing_loss_reported.not_owed) == 0 with input as worker([loss({})])
}

test_ear_that_was_shown_before_is_not_asked_about if {
	again := worker([loss({}), audiogram("a3", "2025-03-05", null, false)])
	{o.key | some o in hearing_loss_reported.obligations} == {"a2"} with input as again
	other_ear := worker([loss({}), audiogram("a3", "2025-03-05", false, null)])
	{o.key | some o in hearing_loss_reported.obligations} == {"a2", "a3"} with input as other_ear
}
