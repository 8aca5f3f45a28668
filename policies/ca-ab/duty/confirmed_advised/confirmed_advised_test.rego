package duty.confirmed_advised_test

import data.duty.confirmed_advised
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

answers(dossier) := found if found := {[o.key, o.after, o.by] | some o in confirmed_advised.obligations} with input as dossier

opinion := done("medical_opinion", "physician")

test_not_advised if {
	answers(worker([object.union(told, {"follow_ups": [opinion], "notices": [object.union(notice("shift"), {"date": "2022-04-01"})]})])) == {["a1", "2022-04-02", null]}
	answers(by_outcome({"follow_ups": [opinion]})) == {["e1", "2022-04-02", null]}
	count(confirmed_advised.not_owed) == 0 with input as by_outcome({"follow_ups": [opinion]})
}

test_advised if {
	answers(worker([object.union(told, {"follow_ups": [opinion]})])) == {["a1", "2022-04-02", {"date": "2022-04-03", "ref": "notice/n"}]}
	answers(by_outcome({"follow_ups": [opinion], "results_on": "2022-04-10"})) == {["e1", "2022-04-02", {"date": "2022-04-10", "ref": "examination/e1"}]}
	informed := object.union(done("worker_informed", null), {"date": "2022-04-20", "ref": "follow_up/g"})
	answers(by_outcome({"follow_ups": [opinion, informed]})) == {["e1", "2022-04-02", {"date": "2022-04-20", "ref": "follow_up/g"}]}
	answers(worker([object.union(told, {"follow_ups": [opinion, informed], "notices": []})])) == {["a1", "2022-04-02", {"date": "2022-04-20", "ref": "follow_up/g"}]}
	{o.health.definitions_met | some o in confirmed_advised.obligations} == {["abnormal_low"]} with input as worker([object.union(told, {"follow_ups": [opinion]})])
}

test_opinion_of_unknown_profession_counts if {
	answers(by_outcome({"follow_ups": [done("medical_opinion", null)]})) == {["e1", "2022-04-02", null]}
	answers(by_outcome({"follow_ups": [done("medical_opinion", "technician")]})) == set()
}

test_not_confirmed if {
	answers(worker([told])) == set()
	count(confirmed_advised.not_owed) == 1 with input as worker([told])
	count(confirmed_advised.not_owed) == 1 with input as by_outcome({})
	count(confirmed_advised.not_owed) == 1 with input as by_outcome({"result": "no_concern", "follow_ups": [opinion]})
	count(confirmed_advised.not_owed) == 1 with input as by_outcome({"attended_on": null, "follow_ups": [opinion]})
	count(confirmed_advised.not_owed) == 0 with input as by_outcome({"damage": true, "result": null, "follow_ups": [opinion]})
}

test_outcome_of_the_same_day_counts_once if {
	both := object.union(worker([object.union(audiogram("2024-03-05", yes, no), {"follow_ups": [opinion]})]), {"examinations": [object.union(examination, {"follow_ups": [opinion]})]})
	{o.key | some o in confirmed_advised.obligations} == {"a1"} with input as both
}

test_before_the_law_or_outside_noise if {
	every dossier in [
		worker([object.union(told, {"date": "2009-06-30", "follow_ups": [done("medical_opinion", "physician")]})]),
		by_outcome({"attended_on": "2019-12-31", "follow_ups": [done("medical_opinion", "physician")]}),
	] {
		count(confirmed_advised.obligations) == 0 with input as dossier
		count(confirmed_advised.not_owed) == 1 with input as dossier
	}
	first_days := object.union(told, {"date": "2009-07-01", "follow_ups": [done("medical_opinion", "physician")]})
	count(confirmed_advised.obligations) == 1 with input as worker([first_days])
}
