package duty.health_surveillance_test

import data.duty.health_surveillance
import rego.v2

site(ever, documents) := {
	"enrolled_ever": ever, "enrolled_now": ever, "documents": documents,
	"levels_now": [level | some level in ["lower_reached", "upper_exceeded"]; ever > 0],
}

paper := {"kind": "surveillance_arrangement", "date": "2024-05-02", "ref": "document/d1"}

holds(dossier) := found if found := {o.holds | some o in health_surveillance.obligations} with input as dossier

test_no_document if {
	holds(site(4, [])) == {false}
	holds(site(4, [{"kind": "annual_report", "date": "2024-05-02", "ref": "document/d2"}])) == {false}
	some o in health_surveillance.obligations with input as site(4, [])
	o.note == "no arrangement for health surveillance is on record"
	count(health_surveillance.not_owed) == 0 with input as site(4, [])
}

test_document if {
	some o in health_surveillance.obligations with input as site(1, [paper])
	o.holds == true
	o.because == ["document/d1"]
}

test_below_the_upper_values_the_risk_is_judged if {
	below := {"levels_now": ["lower_reached"]}
	some o in health_surveillance.obligations with input as object.union(site(4, []), below)
	o.by == null
	contains(o.ask, "risk to the health")
	some p in health_surveillance.obligations with input as object.union(site(4, [paper]), below)
	p.by == {"date": "2024-05-02", "ref": "document/d1"}
}

test_nobody_in_noise if {
	holds(site(0, [])) == set()
	count(health_surveillance.not_owed) == 1 with input as site(0, [])
}
