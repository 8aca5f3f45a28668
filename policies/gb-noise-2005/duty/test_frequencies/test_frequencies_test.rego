package duty.test_frequencies_test

import data.duty.test_frequencies as duty
import rego.v2

now := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2020-01-01", "to": "2021-01-01", "current": false}

open := {"from": "2024-01-01", "to": null, "reason": "not measured"}

obligation(dossier) := only if {
	all := duty.obligations with input as dossier
	some only in all
	count(all) == 1
}

quiet(dossier) if {
	count(duty.obligations) == 0 with input as dossier
	count(duty.not_owed) == 1 with input as dossier
}

audiogram(day, untested, unrecorded) := {
	"id": "a1", "date": day, "ref": "audiogram/a1", "invalidated": false, "not_tested": untested, "not_recorded": unrecorded,
}

worker(spells, audiograms) := {"exposed": {"upper": spells}, "audiograms": audiograms}

test_all_tested if obligation(worker([now], [audiogram("2021-01-01", [], [])])).holds == true

test_one_not_tested if {
	found := obligation(worker([now], [audiogram("2024-02-01", ["left 8000 Hz"], ["left 500 Hz"])]))
	found.holds == false
	found.note == "not tested: left 8000 Hz"
}

test_one_not_recorded if obligation(worker([now], [audiogram("2024-02-01", [], ["left 8000 Hz"])])).holds == null

test_before_the_edition if quiet(worker([now], [audiogram("2020-12-31", ["left 8000 Hz"], [])]))

test_outside_exposure if quiet(worker([past], [audiogram("2024-02-01", ["left 8000 Hz"], [])]))

test_found_invalid if {
	quiet(worker([now], [object.union(audiogram("2024-02-01", ["left 8000 Hz"], []), {"invalidated": true})]))
}
