package duty.free_of_charge_test

import data.duty.free_of_charge
import rego.v2

paper(kind, covers) := {"kind": kind, "date": "2024-01-10", "ref": "document/1", "covers": covers}

site(papers) := {"as_of": "2026-06-30", "enrolled_ever": 12, "documents": papers}

obligation(dossier) := only if {
	all := free_of_charge.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_all_covered if {
	found := obligation(site([paper("hearing_conservation_programme", ["free_protectors", "free_tests"])]))
	found.holds == true
	found.because == ["document/1"]
}

test_two_papers_add_up if obligation(site([paper("hearing_conservation_programme", ["free_protectors"]), paper("hearing_conservation_programme", ["free_tests"])])).holds == true

test_something_left_out if {
	found := obligation(site([paper("hearing_conservation_programme", ["free_protectors"])]))
	found.holds == false
	found.note == "the document leaves out: free tests"
}

test_paper_does_not_say_what_it_covers if {
	found := obligation(site([paper("hearing_conservation_programme", [])]))
	found.holds == null
	found.missing == ["what the document covers"]
}

test_missing if {
	found := obligation(site([paper("advice", ["free_protectors", "free_tests"])]))
	found.holds == false
	count(free_of_charge.not_owed) == 0 with input as site([])
}

test_not_owed if {
	quiet := {"as_of": "2026-06-30", "enrolled_ever": 0, "documents": []}
	free_of_charge.obligations == set() with input as quiet
	count(free_of_charge.not_owed) == 1 with input as quiet
}
