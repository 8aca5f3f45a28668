package duty.test_second_test

import data.duty.test_second
import rego.v2

audiogram(day) := {"date": day, "ref": sprintf("audiogram/%s", [day]), "invalidated": false, "ears_with_result": 2, "purpose": "periodic"}

outcome(day) := {"kind": "hearing_test", "attended_on": day, "ref": sprintf("examination/%s", [day]), "purpose": "periodic"}

spell(from, to) := {"from": from, "to": to}

worker(spells, audiograms, examinations) := {"enrolled": spells, "audiograms": audiograms, "examinations": examinations}

answers(dossier) := found if found := {[o.after, o.by, o.no_sooner_than, o.during.to] | some o in test_second.obligations} with input as dossier

now := spell("2020-01-01", null)

test_no_second_test if {
	answers(worker([now], [audiogram("2020-03-02")], [])) == {["2020-03-02", null, "2020-01-01", null]}
	count(test_second.not_owed) == 0 with input as worker([now], [audiogram("2020-03-02")], [])
}

test_second_test if {
	link := {"date": "2021-03-02", "ref": "examination/2021-03-02"}
	answers(worker([now], [audiogram("2020-03-02")], [outcome("2020-03-02"), outcome("2021-03-02")])) == {["2020-03-02", link, "2020-01-01", null]}
}

test_what_is_no_test if {
	every changes in [{"invalidated": true}, {"ears_with_result": 1}, {"purpose": "retest"}] {
		answers(worker([now], [audiogram("2020-03-02"), object.union(audiogram("2020-05-02"), changes)], [])) == {["2020-03-02", null, "2020-01-01", null]}
	}
	every changes in [{"kind": "health_appointment"}, {"attended_on": null}, {"purpose": "retest"}] {
		answers(worker([now], [audiogram("2020-03-02")], [object.union(outcome("2020-05-02"), changes)])) == {["2020-03-02", null, "2020-01-01", null]}
	}
}

test_first_stretch_that_is_not_over_counts if {
	answers(worker([spell("2018-01-01", "2019-01-01"), spell("2020-01-01", "2022-01-01"), spell("2023-01-01", null)], [audiogram("2019-06-01")], [])) == {["2019-06-01", null, "2020-01-01", "2022-01-01"]}
}

test_baseline_from_before_the_law if {
	answers(worker([spell("2009-07-01", null)], [audiogram("2005-03-09")], [])) == {["2009-07-01", null, "2009-07-01", null]}
	answers(worker([spell("2009-07-01", null)], [audiogram("2009-07-02")], [])) == {["2009-07-02", null, "2009-07-01", null]}
}

test_not_owed if {
	every dossier in [worker([now], [], []), worker([], [audiogram("2020-03-02")], []), worker([spell("2018-01-01", "2019-01-01")], [audiogram("2019-01-01")], [])] {
		answers(dossier) == set()
		count(test_second.not_owed) == 1 with input as dossier
	}
}
