package duty.audiometer_log_test

import data.duty.audiometer_log
import rego.v2

audiometer(calibration) := {"tests": 3, "workers": 3, "latest_calibration": calibration}

link := {"date": "2024-01-10", "ref": "calibration/a"}

holds(dossier) := found if found := {[o.holds, o.because] | some o in audiometer_log.obligations} with input as dossier

test_calibration_on_record if {
	holds(audiometer(link)) == {[true, ["calibration/a"]]}
	{o.note | some o in audiometer_log.obligations} == {null} with input as audiometer(link)
	count(audiometer_log.not_owed) == 0 with input as audiometer(link)
}

test_no_calibration if {
	holds(audiometer(null)) == {[false, []]}
	{o.note | some o in audiometer_log.obligations} == {"no calibration of the audiometer is on record"} with input as audiometer(null)
}

test_not_used if {
	idle := object.union(audiometer(null), {"tests": 0})
	holds(idle) == set()
	count(audiometer_log.not_owed) == 1 with input as idle
}
