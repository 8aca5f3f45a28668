package duty.exposure_notices_kept_test

import data.duty.exposure_notices_kept
import rego.v2

paper(kind, covers) := {"kind": kind, "date": "2024-01-10", "ref": "document/1", "covers": covers}

site(papers) := {"as_of": "2026-06-30", "enrolled_ever": 12, "documents": papers}

obligation(dossier) := only if {
	all := exposure_notices_kept.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_all_covered if {
	found := obligation(site([paper("records_kept", ["exposure_notices"])]))
	found.holds == true
	found.because == ["document/1"]
}

test_paper_on_another_matter if {
	found := obligation(site([paper("records_kept", ["something_else"])]))
	found.holds == false
	found.note == "the document leaves out: exposure notices"
}

test_paper_does_not_say_what_it_covers if {
	found := obligation(site([paper("records_kept", [])]))
	found.holds == null
	found.missing == ["what the document covers"]
}

test_missing if {
	found := obligation(site([paper("advice", ["exposure_notices"])]))
	found.holds == false
	count(exposure_notices_kept.not_owed) == 0 with input as site([])
}

test_not_owed if {
	quiet := {"as_of": "2026-06-30", "enrolled_ever": 0, "documents": []}
	exposure_notices_kept.obligations == set() with input as quiet
	count(exposure_notices_kept.not_owed) == 1 with input as quiet
}
