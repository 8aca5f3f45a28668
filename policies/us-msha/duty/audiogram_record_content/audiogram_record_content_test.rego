package duty.audiogram_record_content_test

import data.duty.audiogram_record_content
import rego.v2

record_of(id, in_program, lacks) := {"id": id, "ref": sprintf("audiogram/%s", [id]), "in_program": in_program, "record_lacks": lacks}

worker(tests) := {"audiograms": tests}

obligation(dossier) := only if {
	all := audiogram_record_content.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_complete if {
	found := obligation(worker([record_of("a1", true, []), record_of("a2", true, ["examiner"])]))
	found.holds == true
	found.facts.audiograms == 2
}

test_contents_missing if {
	found := obligation(worker([
		record_of("a1", true, ["job classification", "examiner"]),
		record_of("a2", true, ["most recent noise exposure assessment"]),
		record_of("a3", true, []),
	]))
	found.holds == false
	found.note == "audiometric records that lack contents: 2 (job classification, most recent noise exposure assessment)"
	found.because == ["audiogram/a1", "audiogram/a2"]
}

test_no_test_under_the_program if {
	outside := worker([record_of("a7", false, ["job classification"])])
	audiogram_record_content.obligations == set() with input as outside
	count(audiogram_record_content.not_owed) == 1 with input as outside
	count(audiogram_record_content.not_owed) == 0 with input as worker([record_of("a1", true, [])])
}
