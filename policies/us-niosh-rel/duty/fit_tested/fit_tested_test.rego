package duty.fit_tested_test

import data.duty.fit_tested as duty
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

after := "2025-06-30"

test_on_record if {
	found := obligation(worker(after, {}))
	found.holds == true
	found.on == "2025-03-01"
	found.because == ["protector_issue/1", "fit_test/1"]
}

test_none if obligation(worker(after, {"fit_test": null, "par_db": null})).holds == false

test_not_passed if {
	found := obligation(worker(after, {"fit_failed": {"date": "2025-03-01", "ref": "fit_test/1"}}))
	found.holds == false
	found.note == "the latest fit test of the protector was not passed"
}

test_no_rating if {
	found := obligation(worker(after, {"par_db": null}))
	found.holds == null
	found.missing == ["the personal attenuation rating (PAR)"]
}

test_from_the_day_of_the_update if {
	obligation(worker("2025-01-30", {"fit_test": null})).holds == false
	duty.obligations == set() with input as worker("2025-01-29", {"fit_test": null})
	duty.not_owed == {"individual fit testing was not yet recommended"} with input as worker("2025-01-29", {})
}

test_not_owed if {
	none := {"as_of": after, "enrolled": [now], "protection": null}
	duty.not_owed == {"no protector at hand, which is a finding of its own"} with input as none
	duty.obligations == set() with input as none
	duty.not_owed == {"the records do not show exposure at or above the REL now"} with input as {"as_of": after, "enrolled": [], "protection": null}
	duty.not_owed == set() with input as worker(after, {})
}
