package duty.test_periodic_test

import data.duty.test_periodic
import rego.v2

audiogram(day) := {"date": day, "ref": sprintf("audiogram/%s", [day]), "invalidated": false, "ears_with_result": 2, "purpose": "periodic"}

outcome(day) := {"kind": "hearing_test", "attended_on": day, "ref": sprintf("examination/%s", [day]), "purpose": "periodic"}

spell(from, to) := {"from": from, "to": to}

worker(spells, audiograms, examinations) := {"enrolled": spells, "audiograms": audiograms, "examinations": examinations}

stretches(dossier) := found if found := {[o.during.from, o.during.to] | some o in test_periodic.obligations} with input as dossier

two := [audiogram("2020-03-02"), audiogram("2021-03-02")]

test_since_the_second_test if {
	stretches(worker([spell("2020-01-01", null)], two, [])) == {["2021-03-02", null]}
	stretches(worker([spell("2020-01-01", null)], [audiogram("2020-03-02")], [outcome("2020-09-02"), outcome("2021-03-02")])) == {["2020-09-02", null]}
	count(test_periodic.not_owed) == 0 with input as worker([spell("2020-01-01", null)], two, [])
}

test_each_stretch_since if {
	stretches(worker([spell("2019-01-01", "2020-01-01"), spell("2020-02-01", "2022-01-01"), spell("2023-01-01", null)], two, [])) == {["2021-03-02", "2022-01-01"], ["2023-01-01", null]}
}

test_what_is_no_test if {
	every changes in [{"invalidated": true}, {"ears_with_result": 1}, {"purpose": "retest"}] {
		stretches(worker([spell("2020-01-01", null)], [audiogram("2020-03-02"), object.union(audiogram("2020-05-02"), changes)], [])) == set()
	}
	every changes in [{"kind": "health_appointment"}, {"attended_on": null}, {"purpose": "retest"}] {
		stretches(worker([spell("2020-01-01", null)], [audiogram("2020-03-02")], [object.union(outcome("2020-05-02"), changes)])) == set()
	}
}

test_not_owed if {
	every dossier in [worker([spell("2020-01-01", null)], [audiogram("2020-03-02")], []), worker([], two, []), worker([spell("2018-01-01", "2021-03-02")], two, [])] {
		stretches(dossier) == set()
		count(test_periodic.not_owed) == 1 with input as dossier
	}
}
