package duty.attenuation_adequate_test

import data.duty.attenuation_adequate as duty
import rego.v2

now := {"from": "2022-01-01", "to": null, "current": true}

protection := {
	"date": "2023-01-10", "ref": "protector_issue/1", "protector": "p1", "under_db": 80.5, "missing": [], "method": "derated", "working": "a sum", "exposure_dba": 92,
	"fit_test": {"date": "2025-03-01", "ref": "fit_test/1"}, "fit_failed": null, "par_db": 15, "under_par_db": 77, "types": ["formable"],
}

worker(as_of, change) := {"as_of": as_of, "enrolled": [now], "exposed": {"double": []}, "protection": object.union(protection, change)}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

before := "2025-01-29"

after := "2025-01-30"

test_derated_until_the_update if {
	found := obligation(worker(before, {}))
	found.value == 80.5
	found.below == "derated_target"
	found.missing == []
	found.because == ["protector_issue/1", "protector/p1"]
	obligation(worker(before, {"fit_test": null})).value == 80.5
}

test_no_estimate if {
	found := obligation(worker(before, {"under_db": null, "missing": ["type of the protector p1, as a plug or a muff"]}))
	found.value == null
	found.missing == ["type of the protector p1, as a plug or a muff"]
	found.note == "the level under the protector cannot be estimated"
}

both(level) := object.union(
	worker(after, {"under_par_db": level, "types": ["formable", "earmuff"]}),
	{"exposed": {"double": [now]}},
)

test_fit_tested_from_the_day_of_the_update if {
	found := obligation(worker(after, {}))
	found.value == 77
	found.below == "fit_tested_target"
	found.missing == []
	found.note == "level at the ear by the personal attenuation rating"
	found.because == ["protector_issue/1", "fit_test/1"]
}

test_level_not_known if {
	found := obligation(worker(after, {"under_par_db": null}))
	found.value == null
	found.missing == ["the exposure, or the personal attenuation rating"]
	found.note == "the level at the ear is not known"
}

test_two_protectors if {
	obligation(both(84.9)).value == 84.9
	obligation(both(85)).value == null
	obligation(both(85)).missing == ["the personal attenuation rating of both protectors together"]
	obligation(both(null)).missing == ["the exposure, or the personal attenuation rating"]
}

test_two_protectors_in_less_noise if {
	obligation(worker(after, {"under_par_db": 85, "types": ["formable", "earmuff"]})).value == 85
}

test_not_owed if {
	none := {"as_of": after, "enrolled": [now], "exposed": {"double": []}, "protection": null}
	duty.not_owed == {"no protector at hand, which is a finding of its own"} with input as none
	duty.obligations == set() with input as none
	gone := object.union(none, {"enrolled": []})
	duty.not_owed == {"the records do not show exposure at or above the REL now"} with input as gone
	untested := worker(after, {"fit_test": null})
	duty.not_owed == {"no fit test of the protector at hand, which is a finding of its own"} with input as untested
	duty.obligations == set() with input as untested
	duty.not_owed == set() with input as worker(after, {})
	duty.not_owed == set() with input as worker(before, {})
}
