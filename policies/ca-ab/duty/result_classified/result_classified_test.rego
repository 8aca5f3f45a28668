package duty.result_classified_test

import data.duty.result_classified
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

holds(test) := found if found := {object.get(o, "holds", "opinion") | some o in result_classified.obligations} with input as worker([test])

answers(test) := found if found := {o.by | some o in result_classified.obligations} with input as worker([test])

test_definitions_decide_until_march_2023 if {
	holds(audiogram("2023-03-30", no, no)) == {true}
	holds(audiogram("2023-03-30", yes, no)) == {true}
	holds(audiogram("2023-03-30", yes, open)) == {true}
	holds(audiogram("2023-03-30", no, open)) == {null}
	{o.health.definitions_met | some o in result_classified.obligations} == {["abnormal_low"]} with input as worker([audiogram("2023-03-30", yes, no)])
	count(result_classified.not_owed) == 0 with input as worker([audiogram("2023-03-30", no, no)])
}

test_baseline_has_no_shift if {
	baseline := object.union(audiogram("2020-03-02", no, {"left": null, "right": null}), {"ref": "audiogram/a0"})
	holds(baseline) == {true}
	holds(object.union(baseline, {"schemes": object.union(baseline.schemes, {"one_sided": open})})) == {null}
}

test_later_the_technician_is_asked if {
	later := audiogram("2023-03-31", open, open)
	holds(later) == {"opinion"}
	answers(later) == {null}
	answers(object.union(later, {"reviewed_on": "2023-04-03"})) == {{"date": "2023-04-03", "ref": "audiogram/a1"}}
	answers(object.union(later, {"follow_ups": [{"date": "2023-04-02", "ref": "follow_up/f"}], "compared_on": "2023-04-03"})) == {{"date": "2023-04-02", "ref": "follow_up/f"}}
	answers(object.union(later, {"notices": [{"date": "2023-04-05", "ref": "notice/n", "about": "result"}]})) == {{"date": "2023-04-05", "ref": "notice/n"}}
	answers(object.union(later, {"notices": [{"date": "2023-04-05", "ref": "notice/n", "about": "quiet_period"}]})) == {null}
}

test_not_owed if {
	outside := object.union(audiogram("2023-03-30", no, no), {"in_program": false})
	holds(outside) == set()
	count(result_classified.not_owed) == 1 with input as worker([outside])
	earlier := audiogram("2009-06-30", open, open)
	holds(earlier) == set()
	count(result_classified.not_owed) == 1 with input as worker([earlier])
	holds(audiogram("2009-07-01", no, no)) == {true}
}
