package duty.data_kept_test

import data.duty.data_kept
import rego.v2

lost := {"id": "m9", "date": "2025-03-05", "ref": "notice/exposure"}

latest := {"date": "2025-01-10", "ref": "measurement/m1"}

site(measurements, missing) := {
	"measurements": measurements, "latest_measurement": [null, latest][min([1, measurements])], "missing_measurements": missing,
}

holds(dossier) := found if found := {[o.key, o.holds] | some o in data_kept.obligations} with input as dossier

test_on_file if {
	holds(site(3, [])) == {["on file", true]}
	count(data_kept.not_owed) == 0 with input as site(3, [])
}

test_lost if {
	holds(site(3, [lost])) == {["on file", true], ["m9", false]}
	count(data_kept.not_owed) == 0 with input as site(0, [lost])
}

test_nothing_measured if {
	holds(site(0, [])) == set()
	count(data_kept.not_owed) == 1 with input as site(0, [])
}
