package duty.records_transferred_test

import data.duty.records_transferred
import rego.v2

paper(kind, covers) := {"kind": kind, "date": "2024-01-10", "ref": "document/1", "covers": covers}

site(papers) := {"as_of": "2026-06-30", "choices": {"successor_operator": true}, "documents": papers}

obligation(dossier) := only if {
	all := records_transferred.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_all_covered if {
	found := obligation(site([paper("transfer", ["records", "baselines"])]))
	found.holds == true
	found.because == ["document/1"]
}

test_two_papers_add_up if obligation(site([paper("transfer", ["records"]), paper("transfer", ["baselines"])])).holds == true

test_something_left_out if {
	found := obligation(site([paper("transfer", ["records"])]))
	found.holds == false
	found.note == "the document leaves out: baselines"
}

test_paper_does_not_say_what_it_covers if {
	found := obligation(site([paper("transfer", [])]))
	found.holds == null
	found.missing == ["what the document covers"]
}

test_missing if {
	found := obligation(site([paper("advice", ["records", "baselines"])]))
	found.holds == false
	count(records_transferred.not_owed) == 0 with input as site([])
}

test_not_owed if {
	quiet := {"as_of": "2026-06-30", "choices": {"successor_operator": false}, "documents": []}
	records_transferred.obligations == set() with input as quiet
	count(records_transferred.not_owed) == 1 with input as quiet
}
