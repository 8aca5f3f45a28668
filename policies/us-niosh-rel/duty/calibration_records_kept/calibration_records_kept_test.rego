package duty.calibration_records_kept_test

import data.duty.calibration_records_kept as duty
import rego.v2

instrument(calibration, years, uses) := {"kind": "dosimeter", "tests": 0, "latest_calibration": calibration, "years": years, "noise_measurements": uses}

link := {"date": "2024-01-10", "ref": "calibration/1"}

obligation(i) := only if {
	all := duty.obligations with input as i
	some only in all
	count(all) == 1
}

test_on_record if {
	found := obligation(instrument(link, [{"last": "2023-05-01"}, {"last": "2024-05-02"}], []))
	found.holds == true
	found.on == "2024-05-02"
	found.for == "calibration_record_retention"
	found.because == ["calibration/1"]
	found.note == "the latest calibration on record is of 2024-01-10"
}

test_missing if {
	found := obligation(instrument(null, [], [{"date": "2023-05-01"}]))
	found.holds == false
	found.on == "2023-05-01"
	found.because == []
	found.note == "no calibration of the instrument is on record"
}

test_not_owed if {
	duty.obligations == set() with input as instrument(link, [], [])
	count(duty.not_owed) == 1 with input as instrument(link, [], [])
	count(duty.not_owed) == 0 with input as instrument(link, [], [{"date": "2023-05-01"}])
}
