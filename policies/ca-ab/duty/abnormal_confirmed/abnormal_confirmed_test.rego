package duty.abnormal_confirmed_test

import data.duty.abnormal_confirmed
import rego.v2

no := {"left": false, "right": false}

yes := {"left": false, "right": true}

open := {"left": null, "right": false}

audiogram(day, low, shift) := {
	"id": "a1", "date": day, "ref": "audiogram/a1", "in_program": true, "follow_ups": [], "notices": [],
	"reviewed_on": null, "compared_on": null,
	"schemes": {"abnormal_low": low, "abnormal_high": no, "one_sided": no, "abnormal_shift": shift},
}

worker(audiograms) := {
	"audiograms": audiograms, "examinations": [], "baseline": {"date": "2020-03-02", "ref": "audiogram/a0"},
	"enrolled": [{"from": "2020-01-01", "to": null}],
}

done(kind, by) := {"date": "2022-04-02", "ref": "follow_up/f", "kind": kind, "by_is": by, "result": null}

notice(about) := {"date": "2022-04-03", "ref": "notice/n", "about": about}

examination := {
	"id": "e1", "ref": "examination/e1", "kind": "hearing_test", "attended_on": "2024-03-05", "results_on": null,
	"result": "concern", "damage": null, "follow_ups": [],
}

by_outcome(changes) := object.union(worker([]), {"examinations": [object.union(examination, changes)]})

told := object.union(audiogram("2022-03-05", yes, no), {"notices": [notice("abnormal_result")]})

referred := object.union(audiogram("2022-03-05", no, no), {"follow_ups": [done("referral", null)]})

answers(dossier) := found if found := {[o.key, o.by] | some o in abnormal_confirmed.obligations} with input as dossier

link := {"date": "2022-04-02", "ref": "follow_up/f"}

test_no_opinion if {
	answers(worker([told])) == {["a1", null]}
	answers(worker([referred])) == {["a1", null]}
	answers(by_outcome({"results_on": "2024-03-06"})) == {["e1", null]}
	answers(by_outcome({"follow_ups": [done("worker_informed", null)]})) == {["e1", null]}
	informed := object.union(told, {"follow_ups": [done("worker_informed", null)]})
	answers(worker([informed])) == {["a1", null]}
	{o.health.definitions_met | some o in abnormal_confirmed.obligations} == {["abnormal_low"]} with input as worker([told])
}

test_opinion if {
	every by in ["physician", "otolaryngologist", "audiologist"] {
		answers(worker([object.union(told, {"follow_ups": [done("medical_opinion", by)]})])) == {["a1", link]}
	}
	answers(by_outcome({"follow_ups": [done("medical_opinion", "physician")]})) == {["e1", link]}
}

test_opinion_of_unknown_profession_does_not_count if {
	unknown := worker([object.union(told, {"follow_ups": [done("medical_opinion", null)]})])
	answers(unknown) == {["a1", null]}
	{o.note | some o in abnormal_confirmed.obligations} == {"the test of 2022-03-05 is abnormal; the profession of whoever gave the opinion of 2022-04-02 is not on record"} with input as unknown
}

test_opinion_of_a_technician_does_not_count if {
	answers(worker([object.union(told, {"follow_ups": [done("medical_opinion", "technician")]})])) == {["a1", null]}
}

test_outcome_of_the_same_day_counts_once if {
	both := object.union(worker([audiogram("2024-03-05", yes, no)]), {"examinations": [examination]})
	{o.key | some o in abnormal_confirmed.obligations} == {"a1"} with input as both
}

test_outcomes if {
	count(abnormal_confirmed.not_owed) == 0 with input as by_outcome({})
	count(abnormal_confirmed.not_owed) == 0 with input as by_outcome({"result": null, "damage": true})
	every changes in [{"result": "no_concern"}, {"result": null}, {"attended_on": null}, {"kind": "health_appointment"}] {
		count(abnormal_confirmed.not_owed) == 1 with input as by_outcome(changes)
		count(abnormal_confirmed.obligations) == 0 with input as by_outcome(changes)
	}
}

test_normal_or_outside if {
	every test in [audiogram("2022-03-05", no, no), object.union(audiogram("2022-03-05", yes, no), {"in_program": false})] {
		count(abnormal_confirmed.obligations) == 0 with input as worker([test])
		count(abnormal_confirmed.not_owed) == 1 with input as worker([test])
	}
}

test_before_the_law_or_outside_noise if {
	every dossier in [
		worker([object.union(told, {"date": "2009-06-30", "follow_ups": [done("medical_opinion", "physician")]})]),
		by_outcome({"attended_on": "2019-12-31", "follow_ups": [done("medical_opinion", "physician")]}),
	] {
		count(abnormal_confirmed.obligations) == 0 with input as dossier
		count(abnormal_confirmed.not_owed) == 1 with input as dossier
	}
	first_days := object.union(told, {"date": "2009-07-01", "follow_ups": [done("medical_opinion", "physician")]})
	count(abnormal_confirmed.obligations) == 1 with input as worker([first_days])
}
