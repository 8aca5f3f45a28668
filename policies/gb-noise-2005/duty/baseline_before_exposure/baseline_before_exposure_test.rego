package duty.baseline_before_exposure_test

import data.duty.baseline_before_exposure as duty
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

worker(spells, hired, audiograms) := {
	"employed": [{"from": hired, "to": null, "current": true}], "exposed": {"upper": spells}, "audiograms": audiograms, "examinations": [],
}

audiogram := {"ref": "audiogram/a1", "invalidated": false}

test_before_the_first_stretch if {
	found := obligation(worker([past, object.union(now, {"from": "2023-01-01"})], "2019-01-01", [audiogram]))
	found.before == "2020-01-01"
	found.by == "test.done"
}

test_outcome_only if {
	attended := {"ref": "examination/e1", "kind": "hearing_test", "attended_on": "2020-01-01"}
	obligation(object.union(worker([now], "2019-01-01", []), {"examinations": [attended]})).before == "2020-01-01"
	quiet(object.union(worker([now], "2019-01-01", []), {"examinations": [object.union(attended, {"attended_on": null})]}))
}

test_no_test if {
	quiet(worker([now], "2019-01-01", []))
	quiet(worker([now], "2019-01-01", [object.union(audiogram, {"invalidated": true})]))
}

test_not_exposed if quiet(worker([], "2019-01-01", [audiogram]))

test_hired_before_the_law if {
	quiet(worker([now], "2006-04-06", [audiogram]))
	obligation(worker([now], "2006-04-07", [audiogram])).by == "test.done"
}

moved(from, to, unknown) := object.union(worker([now], "2001-01-01", [audiogram]), {
	"exposures": [{"from": "2001-01-01", "to": "2020-01-01", "group": from}, {"from": "2020-01-01", "to": null, "group": to}],
	"exposure_unknown": {"upper": unknown},
})

test_job_changers if {
	obligation(moved("store", "foundry", [])).before == "2020-01-01"
	quiet(moved("foundry", "foundry", []))
	quiet(moved("store", "foundry", [{"from": "2019-01-01", "to": "2020-01-01", "reason": "not measured"}]))
}
