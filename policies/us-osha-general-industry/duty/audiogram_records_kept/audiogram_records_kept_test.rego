package duty.audiogram_records_kept_test

import data.duty.audiogram_records_kept as duty
import rego.v2

worker(change) := object.union(
	{
		"employed": [
			{"from": "2015-01-01", "to": "2018-01-01", "current": false},
			{"from": "2020-01-01", "to": null, "current": true},
		],
		"missing_audiograms": [],
		"audiograms": [{"date": "2020-03-02", "ref": "audiogram/a1"}, {"date": "2021-03-01", "ref": "audiogram/a2"}],
	},
	change,
)

lost := [{"date": "2022-04-01", "ref": "notice/n1", "id": "a9"}]

left := [{"from": "2015-01-01", "to": "2018-01-01", "current": false}]

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_all_on_file if {
	found := obligation(worker({}))
	found.holds == true
	found.key == "on file"
	found.facts == {"audiograms": 2, "oldest": "2020-03-02"}
}

test_one_is_lost if {
	found := obligation(worker({"missing_audiograms": lost}))
	found.holds == false
	found.key == "a9"
	found.because == ["notice/n1"]
}

test_the_only_one_is_lost if obligation(worker({"missing_audiograms": lost, "audiograms": []})).holds == false

test_no_longer_employed if {
	gone := worker({"employed": left, "missing_audiograms": lost})
	duty.obligations == set() with input as gone
	duty.not_owed == {"the worker is no longer employed"} with input as gone
}

test_no_audiogram_at_all if {
	untested := worker({"audiograms": []})
	duty.obligations == set() with input as untested
	duty.not_owed == {"the records speak of no audiogram"} with input as untested
}
