package duty.noise_records_kept_test

import data.duty.noise_records_kept
import rego.v2

lost := {"id": "m9", "date": "2025-03-05", "ref": "notice/exposure"}

latest := {"date": "2025-01-10", "ref": "measurement/m1"}

site(ever, measurements, missing) := {
	"enrolled_ever": ever, "enrolled_now": ever, "measurements": measurements,
	"latest_measurement": [null, latest][min([1, measurements])], "missing_measurements": missing,
}

holds(dossier) := found if found := {[o.key, o.holds] | some o in noise_records_kept.obligations} with input as dossier

reasons(dossier) := found if found := noise_records_kept.not_owed with input as dossier

test_on_file if {
	holds(site(40, 3, [])) == {["on file", true]}
	count(reasons(site(40, 3, []))) == 0
}

test_nothing_on_file if holds(site(40, 0, [])) == {["on file", null]}

test_lost if {
	holds(site(40, 3, [lost])) == {["on file", true], ["m9", false]}
	some o in noise_records_kept.obligations with input as site(0, 0, [lost])
	o.for == "noise_record_retention"
	count(reasons(site(0, 0, [lost]))) == 0
}

test_nobody_in_the_program if {
	holds(site(0, 3, [])) == set()
	count(reasons(site(0, 3, []))) == 1
	count(reasons(site(0, 0, []))) == 1
}
