package duty.audiogram_records_kept_test

import data.duty.audiogram_records_kept as duty
import rego.v2

now := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2010-01-01", "to": "2015-07-01", "current": false}

lost := {"id": "a9", "date": "2014-05-01", "ref": "follow_up/f1"}

worker(employed, missing, audiograms) := {"employed": employed, "missing_audiograms": missing, "audiograms": audiograms}

only(w) := found if {
	all := duty.obligations with input as w
	some found in all
	count(all) == 1
}

test_lost_while_employed if {
	found := only(worker([past, now], [lost], []))
	found.holds == false
	found.key == "a9"
	not "for" in object.keys(found)
}

test_lost_of_a_former_worker if {
	found := only(worker([past], [lost], [{"ref": "audiogram/a1"}]))
	found.holds == false
	found.on == "2015-07-01"
	found.for == "medical_record_retention"
}

test_on_file if {
	found := only(worker([past], [], [{"ref": "audiogram/a1"}]))
	found.holds == true
	found.because == ["audiogram/a1"]
	found.facts.audiograms == 1
}

test_not_owed if {
	duty.obligations == set() with input as worker([now], [], [])
	count(duty.not_owed) == 1 with input as worker([now], [], [])
	count(duty.not_owed) == 0 with input as worker([now], [lost], [])
}
