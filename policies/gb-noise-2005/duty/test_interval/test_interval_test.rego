package duty.test_interval_test

import data.duty.test_interval as duty
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

worker(spells, audiograms) := {
	"employed": [{"from": "2019-01-01", "to": null, "current": true}], "exposed": {"upper": spells}, "audiograms": audiograms, "examinations": [],
}

audiogram(day, invalid) := {"date": day, "invalidated": invalid}

test_from_the_first_test_on if {
	found := obligation(worker([now], [audiogram("2022-02-01", false), audiogram("2024-02-01", false), audiogram("2021-02-01", true)]))
	found.every == "test_interval_first"
	found.until == "test_interval_first_years"
	found.then == "test_interval_later"
	found.since == "2019-01-01"
	found.during == {"from": "2022-02-01", "to": null}
}

test_from_the_start_of_exposure_on if {
	obligation(worker([now], [audiogram("2019-12-01", false)])).during.from == "2020-01-01"
}

test_years_count_from_the_employment_of_the_stretch if {
	hired_again := [{"from": "2010-01-01", "to": "2016-01-01"}, {"from": "2019-01-01", "to": null}]
	w := object.union(worker([object.union(past, {"from": "2010-01-01", "to": "2016-01-01"})], [audiogram("2010-01-01", false)]), {"employed": hired_again})
	obligation(w).since == "2010-01-01"
	long_ago := object.union(worker([now], [audiogram("2022-02-01", false)]), {"employed": [{"from": "2001-01-01", "to": null}]})
	obligation(long_ago).since == "2006-04-06"
}

test_outcome_only if {
	examinations := [
		{"kind": "hearing_test", "attended_on": "2022-03-01"}, {"kind": "hearing_test", "attended_on": null},
		{"kind": "health_appointment", "attended_on": "2020-03-01"},
	]
	obligation(object.union(worker([now], []), {"examinations": examinations})).during.from == "2022-03-01"
}

test_stretches_before_the_first_test_are_left_out if {
	found := obligation(worker([past, object.union(now, {"from": "2023-01-01"})], [audiogram("2022-02-01", false)]))
	found.during.from == "2023-01-01"
}

test_tested_only_after_the_exposure if quiet(worker([past], [audiogram("2021-01-01", false)]))

test_never_tested if quiet(worker([now], []))

test_never_exposed if quiet(worker([], [audiogram("2022-02-01", false)]))
