package duty.monitoring_system_test

import data.duty.monitoring_system
import rego.v2

paper := {"kind": "monitoring_system", "date": "2024-01-10", "ref": "document/1", "covers": []}

other := {"kind": "advice", "date": "2024-01-10", "ref": "document/2", "covers": []}

site(papers) := {"workers": 12, "documents": papers}

holds(dossier) := found if found := {o.holds | some o in monitoring_system.obligations} with input as dossier

test_on_record if {
	holds(site([other, paper])) == {true}
	some o in monitoring_system.obligations with input as site([other, paper])
	o.because == ["document/1"]
	o.on == "2024-01-10"
}

test_missing if {
	holds(site([other])) == {false}
	count(monitoring_system.not_owed) == 0 with input as site([other])
}

test_not_owed if {
	quiet := {"workers": 0, "documents": [paper]}
	holds(quiet) == set()
	count(monitoring_system.not_owed) == 1 with input as quiet
}
