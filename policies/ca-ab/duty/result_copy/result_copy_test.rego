package duty.result_copy_test

import data.duty.result_copy
import rego.v2

audiogram := {"id": "a1", "date": "2024-03-05", "ref": "audiogram/a1", "in_program": true, "notices": []}

examination := {"id": "e1", "ref": "examination/e1", "kind": "hearing_test", "attended_on": "2022-03-05", "results_on": null}

worker(audiograms, examinations) := {
	"audiograms": audiograms, "examinations": examinations, "missing_audiograms": [],
	"enrolled": [{"from": "2020-01-01", "to": null}],
}

notice(about) := {"date": "2024-03-20", "ref": "notice/n", "about": about}

holds(dossier) := found if found := {[o.key, o.holds] | some o in result_copy.obligations} with input as dossier

test_not_told if {
	holds(worker([audiogram], [examination])) == {["a1", false], ["e1", false]}
	{o.note | some o in result_copy.obligations; o.key == "a1"} == {"no record shows that the worker was given the result of the test of 2024-03-05"} with input as worker([audiogram], [])
	count(result_copy.not_owed) == 0 with input as worker([audiogram], [])
}

test_told if {
	every about in ["result", "abnormal_result", "shift"] {
		holds(worker([object.union(audiogram, {"notices": [notice(about)]})], [])) == {["a1", true]}
	}
	holds(worker([object.union(audiogram, {"notices": [notice("quiet_period")]})], [])) == {["a1", false]}
	holds(worker([], [object.union(examination, {"results_on": "2022-03-07"})])) == {["e1", true]}
	{o.because | some o in result_copy.obligations} == {["audiogram/a1", "notice/n"]} with input as worker([object.union(audiogram, {"notices": [notice("result")]})], [])
}

test_outcome_of_the_same_day if {
	same := object.union(examination, {"attended_on": "2024-03-05", "results_on": "2024-03-06"})
	holds(worker([audiogram], [same])) == {["a1", true]}
	holds(worker([audiogram], [object.union(same, {"kind": "health_appointment"})])) == {["a1", false]}
}

test_first_day_of_the_law if holds(worker([object.union(audiogram, {"date": "2009-07-01"})], [])) == {["a1", false]}

test_not_owed if {
	every dossier in [
		worker([object.union(audiogram, {"date": "2009-06-30"})], []),
		worker([object.union(audiogram, {"in_program": false})], []), worker([], [object.union(examination, {"attended_on": null})]),
		worker([], [object.union(examination, {"attended_on": "2019-12-31"})]), worker([], [object.union(examination, {"kind": "health_appointment"})]),
	] {
		holds(dossier) == set()
		count(result_copy.not_owed) == 1 with input as dossier
	}
}
