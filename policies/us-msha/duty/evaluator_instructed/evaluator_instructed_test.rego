package duty.evaluator_instructed_test

import data.duty.evaluator_instructed
import rego.v2

paper(kind, covers) := {"kind": kind, "date": "2024-01-10", "ref": "document/1", "covers": covers}

site(papers) := {"as_of": "2026-06-30", "enrolled_ever": 12, "documents": papers}

obligation(dossier) := only if {
	all := evaluator_instructed.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_all_covered if {
	found := obligation(site([paper("instruction", ["privacy", "otological_examination"])]))
	found.holds == true
	found.because == ["document/1"]
}

test_two_papers_add_up if obligation(site([paper("instruction", ["privacy"]), paper("instruction", ["otological_examination"])])).holds == true

test_something_left_out if {
	found := obligation(site([paper("instruction", ["privacy"])]))
	found.holds == false
	found.note == "the document leaves out: otological examination"
}

test_paper_does_not_say_what_it_covers if {
	found := obligation(site([paper("instruction", [])]))
	found.holds == null
	found.missing == ["what the document covers"]
}

test_missing if {
	found := obligation(site([paper("advice", ["privacy", "otological_examination"])]))
	found.holds == false
	count(evaluator_instructed.not_owed) == 0 with input as site([])
}

test_not_owed if {
	quiet := {"as_of": "2026-06-30", "enrolled_ever": 0, "documents": []}
	evaluator_instructed.obligations == set() with input as quiet
	count(evaluator_instructed.not_owed) == 1 with input as quiet
}
