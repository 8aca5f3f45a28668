package duty.test_baseline_test

import data.duty.test_baseline
import rego.v2

audiogram(day) := {"date": day, "ref": sprintf("audiogram/%s", [day]), "invalidated": false, "ears_with_result": 2, "purpose": "periodic"}

outcome(day) := {"kind": "hearing_test", "attended_on": day, "ref": sprintf("examination/%s", [day]), "purpose": "periodic"}

spell(from, to) := {"from": from, "to": to}

worker(spells, audiograms, examinations) := {"enrolled": spells, "audiograms": audiograms, "examinations": examinations}

answers(spells, audiograms, examinations) := found if {
	dossier := object.union(worker(spells, audiograms, examinations), {"exposures": [{"from": "2020-01-01", "ref": "measurement/m1"}]})
	found := {[o.after, o.by] | some o in test_baseline.obligations} with input as dossier
}

test_not_tested if {
	answers([spell("2020-01-01", null)], [], []) == {["2020-01-01", null]}
	some o in test_baseline.obligations with input as object.union(worker([spell("2020-01-01", null)], [], []), {"exposures": [{"from": "2020-01-01", "ref": "measurement/m1"}]})
	o.within == "baseline_time"
	o.because == ["measurement/m1"]
}

test_tested if {
	answers([spell("2020-01-01", null)], [audiogram("2020-03-02"), audiogram("2021-03-02")], []) == {["2020-01-01", {"date": "2020-03-02", "ref": "audiogram/2020-03-02"}]}
	answers([spell("2020-01-01", null)], [audiogram("2020-03-02")], [outcome("2020-02-02")]) == {["2020-01-01", {"date": "2020-02-02", "ref": "examination/2020-02-02"}]}
}

test_what_is_no_test if {
	every changes in [{"invalidated": true}, {"ears_with_result": 1}, {"purpose": "retest"}] {
		answers([spell("2020-01-01", null)], [object.union(audiogram("2020-03-02"), changes)], []) == {["2020-01-01", null]}
	}
	every changes in [{"kind": "health_appointment"}, {"attended_on": null}, {"purpose": "retest"}] {
		answers([spell("2020-01-01", null)], [], [object.union(outcome("2020-03-02"), changes)]) == {["2020-01-01", null]}
	}
}

test_not_owed if {
	count(test_baseline.obligations) == 0 with input as worker([], [], [])
	count(test_baseline.not_owed) == 1 with input as worker([], [], [])
	count(test_baseline.not_owed) == 0 with input as worker([spell("2020-01-01", null)], [], [])
}
