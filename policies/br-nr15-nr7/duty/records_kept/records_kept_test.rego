package duty.records_kept_test

import data.duty.records_kept as duty
import rego.v2

lost := {"id": "a9", "date": "2023-02-20", "ref": "follow_up/f1"}

audiogram := {"id": "a1", "date": "2022-02-20", "ref": "audiogram/a1"}

left := {
	"as_of": "2026-06-30", "employed": [{"from": "2020-01-01", "to": "2024-01-01", "current": false}],
	"departures": [{"last": "2023-12-31"}], "missing_audiograms": [], "audiograms": [audiogram],
}

employed := object.union(left, {"employed": [{"from": "2020-01-01", "to": null, "current": true}], "departures": []})

obligation(w) := o if some o in duty.obligations with input as w

test_on_file if {
	obligation(employed).holds == true
	obligation(employed).on == "2026-06-30"
	obligation(left).on == "2023-12-31"
	obligation(left).for == "record_retention"
}

test_lost if {
	o := obligation(object.union(left, {"missing_audiograms": [lost]}))
	o.holds == false
	o.key == "a9"
	o.on == "2023-12-31"
	o.because == ["follow_up/f1"]
}

test_no_exam if {
	none := object.union(employed, {"audiograms": []})
	not obligation(none)
	reasons := duty.not_owed with input as none
	count(reasons) == 1
}
