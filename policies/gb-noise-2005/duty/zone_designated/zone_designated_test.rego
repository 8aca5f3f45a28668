package duty.zone_designated_test

import data.duty.zone_designated as duty
import rego.v2

now := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2020-01-01", "to": "2021-01-01", "current": false}

open := {"from": "2024-01-01", "to": null, "reason": "not measured"}

obligation(dossier) := only if {
	all := duty.obligations with input as dossier
	some only in all
	count(all) == 1
}

quiet(dossier) if {
	count(duty.obligations) == 0 with input as dossier
	count(duty.not_owed) == 1 with input as dossier
}

area(change) := object.union(
	{
		"id": "hall 1", "as_of": "2026-06-30", "choices": {"exemption": "none"}, "workers": 4, "documents": [],
		"wear_checks": [], "exposed": {"upper": [now]}, "exposure_unknown": {"upper": []},
	},
	change,
)

paper(kind, covers) := {"kind": kind, "date": "2024-01-10", "ref": "document/z", "covers": covers}

test_exempted if {
	endswith(obligation(area({"choices": {"exemption": "emergency_services"}})).cite, "reg 12")
	obligation(area({"choices": {"exemption": "defence"}})).lifted == "a certificate exempts the site from hearing protection zones"
	not obligation(area({"choices": {"exemption": "overall_risk"}})).lifted
	quiet(area({"choices": {"exemption": "defence"}, "exposed": {"upper": []}}))
}

test_no_zone if quiet(area({"exposed": {"upper": [past]}}))

test_no_record if obligation(area({})).holds == false

test_on_record if {
	found := obligation(area({"documents": [paper("zone_plan", [])]}))
	found.holds == true
	found.because == ["document/z"]
	obligation(area({"documents": [paper("zone_plan", ["hall 2", "hall 1"])]})).holds == true
}

test_record_of_another_area_or_kind if {
	obligation(area({"documents": [paper("zone_plan", ["hall 2"])]})).holds == false
	obligation(area({"documents": [paper("another", [])]})).holds == false
}

test_not_known if {
	unknown := {"exposed": {"lower": [now], "upper": []}, "exposure_unknown": {"upper": [open]}}
	obligation(area(unknown)).holds == null
	duty.not_owed == set() with input as area(unknown)
	quiet(area(object.union(unknown, {"choices": {"exemption": "defence"}})))
	every lower in [[], [past]] {
		quiet(area(object.union(unknown, {"exposed": {"lower": lower, "upper": []}})))
	}
}
