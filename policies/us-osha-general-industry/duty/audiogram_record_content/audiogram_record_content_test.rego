package duty.audiogram_record_content_test

import data.duty.audiogram_record_content as duty
import rego.v2

record_of(id, in_program, lacks) := {
	"id": id,
	"ref": sprintf("audiogram/%s", [id]),
	"in_program": in_program,
	"record_lacks": lacks,
}

worker(tests) := {"audiograms": tests}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_complete if {
	found := obligation(worker([record_of("a1", true, []), record_of("a2", true, [])]))
	found.holds == true
	found.facts.audiograms == 2
}

test_contents_missing if {
	found := obligation(worker([
		record_of("a1", true, ["examiner"]),
		record_of("a2", true, ["noise exposure assessment", "examiner"]),
		record_of("a3", true, []),
	]))
	found.holds == false
	found.note == "audiometric records that lack contents: 2 (examiner, noise exposure assessment)"
	found.because == ["audiogram/a1", "audiogram/a2"]
}

test_tests_outside_the_program_do_not_matter if {
	duty.obligations == set() with input as worker([record_of("a7", false, ["examiner"])])
	duty.not_owed == {"there is no audiogram under the program"} with input as worker([record_of("a7", false, ["examiner"])])
}

test_no_audiogram if {
	duty.obligations == set() with input as {"baseline": null, "audiograms": []}
	count(duty.not_owed) == 1 with input as {"baseline": null, "audiograms": []}
}
