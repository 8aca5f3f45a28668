package duty.zone_entry_test

import data.duty.zone_entry as duty
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

check(observed, wearing) := {"date": "2026-03-01", "ref": "wear_check/z", "observed": observed, "wearing": wearing}

test_never_checked if obligation(area({})).holds == null

test_all_wear if {
	found := obligation(area({"wear_checks": [check(10, 9), check(12, 12)]}))
	found.holds == true
	found.note == "on 2026-03-01 12 of 12 in the zone wore protectors"
}

test_a_look_before_it_was_a_zone_does_not_count if {
	obligation(area({"wear_checks": [object.union(check(12, 12), {"date": "2019-12-31"})]})).missing == ["a check of the area"]
	obligation(area({"wear_checks": [object.union(check(12, 12), {"date": "2020-01-01"})]})).holds == true
}

test_one_without if obligation(area({"wear_checks": [check(12, 12), check(12, 11)]})).holds == false

test_numbers_missing if {
	obligation(area({"wear_checks": [check(12, null)]})).missing == ["the numbers of the check"]
	obligation(area({"wear_checks": [check(null, 12)]})).holds == null
}
