package duty.surveillance_consultation_test

import data.duty.surveillance_consultation as duty
import rego.v2

paper(covers) := {"kind": "consultation", "date": "2024-01-10", "ref": "document/d1", "covers": covers}

site(levels, documents) := {"enrolled_now": 12, "levels_now": levels, "documents": documents}

obligation(dossier) := only if {
	all := duty.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_no_record if obligation(site(["upper"], [])).holds == false

test_on_record if {
	found := obligation(site(["lower", "upper"], [paper(["health_surveillance"])]))
	found.holds == true
	found.because == ["document/d1"]
	duty.not_owed == set() with input as site(["lower", "upper"], [paper(["health_surveillance"])])
}

test_record_on_something_else if obligation(site(["upper"], [paper(["something_else"])])).holds == false

test_record_of_another_kind if {
	obligation(site(["upper"], [object.union(paper(["health_surveillance"]), {"kind": "another"})])).holds == false
}

test_record_that_does_not_say_what_it_covers if {
	found := obligation(site(["upper"], [paper([])]))
	found.holds == null
	found.missing == ["what the record covers"]
}

test_nobody_exposed if {
	duty.obligations == set() with input as site(["lower"], [])
	count(duty.not_owed) == 1 with input as site(["lower"], [])
}
