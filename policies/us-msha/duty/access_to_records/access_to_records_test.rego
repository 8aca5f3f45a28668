package duty.access_to_records_test

import data.duty.access_to_records
import rego.v2

paper(kind, covers) := {"kind": kind, "date": "2024-01-10", "ref": "document/1", "covers": covers}

site(papers) := {"as_of": "2026-06-30", "enrolled_ever": 12, "documents": papers}

obligation(dossier) := only if {
	all := access_to_records.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_all_covered if {
	found := obligation(site([paper("access_to_records", ["miners", "representatives", "former_miners", "first_copy_free"])]))
	found.holds == true
	found.because == ["document/1"]
}

test_two_papers_add_up if obligation(site([paper("access_to_records", ["miners"]), paper("access_to_records", ["representatives", "former_miners", "first_copy_free"])])).holds == true

test_something_left_out if {
	found := obligation(site([paper("access_to_records", ["miners"])]))
	found.holds == false
	found.note == "the document leaves out: representatives, former miners, first copy free"
}

test_paper_does_not_say_what_it_covers if {
	found := obligation(site([paper("access_to_records", [])]))
	found.holds == null
	found.missing == ["what the document covers"]
}

test_missing if {
	found := obligation(site([paper("advice", ["miners", "representatives", "former_miners", "first_copy_free"])]))
	found.holds == false
	count(access_to_records.not_owed) == 0 with input as site([])
}

test_not_owed if {
	quiet := {"as_of": "2026-06-30", "enrolled_ever": 0, "documents": []}
	access_to_records.obligations == set() with input as quiet
	count(access_to_records.not_owed) == 1 with input as quiet
}
