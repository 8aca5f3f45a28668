package duty.test_records_kept_test

import data.duty.test_records_kept
import rego.v2

audiogram := {"id": "a1", "date": "2024-03-05", "ref": "audiogram/a1", "in_program": true, "notices": []}

examination := {"id": "e1", "ref": "examination/e1", "kind": "hearing_test", "attended_on": "2022-03-05", "results_on": null}

worker(audiograms, examinations) := {
	"audiograms": audiograms, "examinations": examinations, "missing_audiograms": [],
	"enrolled": [{"from": "2020-01-01", "to": null}],
}

notice(about) := {"date": "2024-03-20", "ref": "notice/n", "about": about}

lost := {"id": "a9", "date": "2016-06-30", "ref": "follow_up/f"}

holds(dossier) := found if found := {[o.key, o.holds] | some o in test_records_kept.obligations} with input as dossier

test_lost if {
	dossier := object.union(worker([audiogram], []), {"missing_audiograms": [lost]})
	holds(dossier) == {["a9", false]}
	{[o.on, o.for] | some o in test_records_kept.obligations} == {["2016-06-30", "test_record_retention"]} with input as dossier
	count(test_records_kept.not_owed) == 0 with input as dossier
}

test_on_file if {
	holds(worker([audiogram], [])) == {["on file", true]}
	holds(worker([], [examination])) == {["on file", true]}
}

test_not_owed if {
	every dossier in [worker([], []), worker([], [object.union(examination, {"attended_on": null})]), worker([], [object.union(examination, {"kind": "health_appointment"})])] {
		holds(dossier) == set()
		count(test_records_kept.not_owed) == 1 with input as dossier
	}
}
