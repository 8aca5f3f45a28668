package duty.warning_signs_test

import data.duty.warning_signs as duty
import rego.v2

now := {"from": "2022-01-01", "to": null, "current": true}

sign := {"kind": "zone_signs", "date": "2024-01-10", "ref": "document/1", "posted_to": null}

area(spells, unknown, papers) := {"as_of": "2026-06-30", "exposed": {"rel": spells}, "exposure_unknown": {"rel": unknown}, "documents": papers, "workers": 4}

open := {"from": "2022-01-01", "to": null, "reason": "not measured"}

obligation(a) := only if {
	all := duty.obligations with input as a
	some only in all
	count(all) == 1
}

test_posted if {
	found := obligation(area([now], [], [sign]))
	found.holds == true
	found.on == "2024-01-10"
	found.because == ["document/1"]
}

test_not_posted if {
	obligation(area([now], [], [])).holds == false
	obligation(area([now], [], [object.union(sign, {"kind": "zone_plan"})])).holds == false
}

test_taken_down if {
	obligation(area([now], [], [object.union(sign, {"posted_to": "2026-06-29"})])).holds == false
	obligation(area([now], [], [object.union(sign, {"posted_to": "2026-06-30"})])).holds == true
}

test_not_known if {
	found := obligation(area([], [open], []))
	found.holds == null
	found.note == "it is not known whether exposure in the area reaches the REL: not measured"
	duty.not_owed == set() with input as area([], [open], [])
}

test_not_known_and_posted if {
	duty.obligations == set() with input as area([], [open], [sign])
	duty.not_owed == {"signs are posted, whether or not they are needed"} with input as area([], [open], [sign])
}

test_not_owed if {
	past := object.union(now, {"to": "2024-01-01", "current": false})
	quiet := area([past], [object.union(open, {"to": "2024-01-01"})], [])
	duty.obligations == set() with input as quiet
	count(duty.not_owed) == 1 with input as quiet
	duty.not_owed == set() with input as area([now], [], [])
}
