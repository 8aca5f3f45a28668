package duty.noise_register_test

import data.duty.noise_register
import rego.v2

site(papers) := {
	"as_of": "2026-06-30", "measurements": 2, "enrolled_ever": 0,
	"latest_measurement": {"date": "2024-03-05", "ref": "measurement/m1"}, "documents": papers,
}

register(covers) := {"kind": "noise_register", "date": "2024-01-01", "ref": "document/register", "covers": covers}

holds(dossier) := found if found := {[object.get(o, "key", ""), o.holds] | some o in noise_register.obligations} with input as dossier

test_no_register if {
	holds(site([])) == {["", false]}
	holds(site([object.union(register(["situations"]), {"kind": "advice"})])) == {["", false]}
	count(noise_register.not_owed) == 0 with input as site([])
}

test_complete if holds(site([register(["situations", "means", "measurement_reports"])])) == {["situations", true], ["means", true], ["measurement_reports", true]}

test_means_lacking if {
	holds(site([register(["situations", "measurement_reports"])])) == {["situations", true], ["means", false], ["measurement_reports", true]}
	some o in noise_register.obligations with input as site([register(["situations"])])
	o.key == "measurement_reports"
	o.note == "the register holds no measurement reports"
}

test_contents_not_recorded if holds(site([register([])])) == {["situations", null], ["means", null], ["measurement_reports", null]}

test_not_owed if {
	every changes in [{"measurements": 0}, {"as_of": "2023-06-15"}] {
		holds(object.union(site([]), changes)) == set()
		count(noise_register.not_owed) == 1 with input as object.union(site([]), changes)
	}
}
