package duty.evaluator_informed_test

import data.duty.evaluator_informed
import rego.v2

paper(kind, covers) := {"kind": kind, "date": "2024-01-10", "ref": "document/1", "covers": covers}

site(papers) := {"as_of": "2026-06-30", "enrolled_ever": 12, "documents": papers}

obligation(dossier) := only if {
	all := evaluator_informed.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_all_covered if {
	found := obligation(site([paper("instruction", ["part_62", "test_records"])]))
	found.holds == true
	found.because == ["document/1"]
}

test_two_papers_add_up if obligation(site([paper("instruction", ["part_62"]), paper("instruction", ["test_records"])])).holds == true

test_something_left_out if {
	found := obligation(site([paper("instruction", ["part_62"])]))
	found.holds == false
	found.note == "the document leaves out: test records"
}

test_paper_does_not_say_what_it_covers if {
	found := obligation(site([paper("instruction", [])]))
	found.holds == null
	found.missing == ["what the document covers"]
}

test_missing if {
	found := obligation(site([paper("advice", ["part_62", "test_records"])]))
	found.holds == false
	count(evaluator_informed.not_owed) == 0 with input as site([])
}

test_not_owed if {
	quiet := {"as_of": "2026-06-30", "enrolled_ever": 0, "documents": []}
	evaluator_informed.obligations == set() with input as quiet
	count(evaluator_informed.not_owed) == 1 with input as quiet
}
