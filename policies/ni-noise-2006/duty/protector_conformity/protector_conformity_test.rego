package duty.protector_conformity_test

import data.duty.protector_conformity as duty
import rego.v2

paper(covers) := {"kind": "purchase_file", "date": "2024-01-10", "ref": "document/d1", "covers": covers}

site(levels, documents) := {"enrolled_now": 12, "levels_now": levels, "documents": documents}

obligation(dossier) := only if {
	all := duty.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_no_record if obligation(site(["lower"], [])).holds == false

test_on_record if {
	found := obligation(site(["lower", "lower"], [paper(["protector_conformity"])]))
	found.holds == true
	found.because == ["document/d1"]
	duty.not_owed == set() with input as site(["lower", "lower"], [paper(["protector_conformity"])])
}

test_record_on_something_else if obligation(site(["lower"], [paper(["something_else"])])).holds == false

test_record_of_another_kind if {
	obligation(site(["lower"], [object.union(paper(["protector_conformity"]), {"kind": "another"})])).holds == false
}

test_record_that_does_not_say_what_it_covers if {
	found := obligation(site(["lower"], [paper([])]))
	found.holds == null
	found.missing == ["what the record covers"]
}

test_nobody_exposed if {
	duty.obligations == set() with input as site([], [])
	count(duty.not_owed) == 1 with input as site([], [])
}
