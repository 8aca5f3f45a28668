package duty.protectors_worn_test

import data.duty.protectors_worn
import rego.v2

since(day) := {"from": day, "to": null, "current": true}

formerly := {"from": "2020-01-01", "to": "2021-01-01", "current": false}

enrolled(baseline, mobile) := {"from": "2024-01-01", "to": null, "current": true, "baseline": baseline, "baseline_mobile": mobile}

baseline := {"date": "2024-12-01", "ref": "audiogram/a1"}

worker := {
	"as_of": "2026-06-30", "exposed": {"limit": []}, "exposure_unknown": {"limit": []}, "shifts": [],
	"enrolled": [enrolled(baseline, false)], "examinations": [], "revisions": [], "wear": null,
}

wear(worn, day) := {"date": day, "ref": "wear_check/w1", "worn": worn, "own": true}

above(check) := object.union(worker, {"exposed": {"limit": [since("2024-01-01")]}, "wear": check})

shifted(check) := object.union(worker, {"shifts": [{"date": "2025-03-05", "ref": "audiogram/a2"}], "wear": check})

not_known := object.union(worker, {"exposure_unknown": {"limit": [{"from": "2025-01-01", "to": null, "reason": "not measured"}]}})

waiting := object.union(worker, {"enrolled": [enrolled(null, null)]})

offer(answer, day) := {"kind": "hearing_test", "answer": answer, "offered_on": day}

holds(dossier) := found if found := {o.holds | some o in protectors_worn.obligations; o.key == "now"} with input as dossier

reasons(dossier) := found if found := protectors_worn.not_owed with input as dossier

waits(dossier) := found if found := {o.key | some o in protectors_worn.obligations; "within" in object.keys(o)} with input as dossier

test_seen_without_protectors if holds(above(wear(false, "2026-05-05"))) == {false}

test_seen_with_protectors if {
	holds(above(wear(true, "2026-05-05"))) == {true}
	holds(shifted(wear(true, "2025-03-05"))) == {true}
}

test_never_checked if {
	holds(above(null)) == {null}
	holds(shifted(null)) == {null}
	count(reasons(above(null))) == 0
}

test_check_before_it_was_compulsory_does_not_count if holds(shifted(wear(true, "2025-03-04"))) == {null}

test_check_counts_from_the_earlier_of_two_reasons if {
	both := object.union(above(wear(true, "2024-06-01")), {"shifts": [{"date": "2025-03-05", "ref": "audiogram/a2"}]})
	holds(both) == {true}
	{o.facts.compulsory | some o in protectors_worn.obligations} == {["exposure above the permissible exposure level", "a standard threshold shift"]} with input as both
}

test_check_without_outcome if holds(above(wear(null, "2026-05-05"))) == {null}

test_not_known_whether_compulsory if {
	some o in protectors_worn.obligations with input as not_known
	o.holds == null
	contains(o.note, "not measured")
	count(reasons(not_known)) == 0
}

test_shift_decides_even_where_exposure_is_not_known if {
	holds(object.union(shifted(wear(true, "2026-05-05")), {"exposure_unknown": not_known.exposure_unknown})) == {true}
}

test_miner_not_known_to_be_in_the_program if {
	outside := object.union(not_known, {"enrolled": []})
	holds(outside) == set()
	count(reasons(outside)) == 1
}

test_shift_matters_only_in_the_program if {
	left := object.union(shifted(null), {"enrolled": [object.union(formerly, {"baseline": baseline, "baseline_mobile": false})]})
	holds(left) == set()
}

anew(result) := object.union(shifted(null), {"revisions": [{"audiogram": "audiogram/a2", "result": result}]})

test_new_baseline_after_an_absence_shows_no_shift if {
	holds(anew("new_baseline")) == set()
	holds(anew("persistent")) == {null}
}

test_waits_for_a_baseline if {
	waits(waiting) == {"no baseline/2024-01-01"}
	some o in protectors_worn.obligations with input as waiting
	o.within == "baseline_time"
	o.by == ["audiogram.baseline", "protector.worn"]
	count(reasons(waiting)) == 0
}

test_baseline_made_in_a_van if waits(object.union(worker, {"enrolled": [enrolled(baseline, true)]})) == {"no baseline/2024-01-01"}

test_declined_the_test if {
	waits(object.union(waiting, {"examinations": [offer("declined", "2024-03-01")]})) == set()
	waits(object.union(waiting, {"examinations": [offer("declined", "2023-03-01")]})) == {"no baseline/2024-01-01"}
	waits(object.union(waiting, {"examinations": [offer("accepted", "2024-03-01")]})) == {"no baseline/2024-01-01"}
	appointment := object.union(offer("declined", "2024-03-01"), {"kind": "health_appointment"})
	waits(object.union(waiting, {"examinations": [appointment]})) == {"no baseline/2024-01-01"}
}

test_not_compulsory if {
	holds(worker) == set()
	waits(worker) == set()
	count(reasons(worker)) == 1
}

test_no_longer_above if {
	past := object.union(worker, {"exposed": {"limit": [formerly]}, "wear": wear(false, "2020-06-01")})
	holds(past) == set()
	count(reasons(past)) == 1
}

waiting_and_loud_from(day) := object.union(waiting, {"exposed": {"limit": [since(day)]}})

test_waiting_is_not_said_beside_wear_that_is_compulsory_throughout if {
	waits(waiting_and_loud_from("2024-01-01")) == set()
	holds(waiting_and_loud_from("2024-01-01")) == {null}
	waits(waiting_and_loud_from("2024-01-02")) == {"no baseline/2024-01-01"}
}
