package duty.noise_program_test

import data.duty.noise_program
import rego.v2

site(papers) := {"as_of": "2026-06-30", "enrolled_now": 4, "documents": papers}

program(covers) := {"kind": "written_program", "date": "2020-01-01", "ref": "document/p", "covers": covers}

holds(dossier) := found if found := {[o.key, o.holds] | some o in noise_program.obligations} with input as dossier

test_no_program if {
	holds(site([])) == {["program", false]}
	holds(site([object.union(program(["review"]), {"kind": "advice"})])) == {["program", false]}
	count(noise_program.not_owed) == 0 with input as site([])
}

test_part_is_lacking if {
	found := holds(site([program(["education", "measurement", "controls", "protectors", "audiometry"])]))
	["review", false] in found
	["education", true] in found
	count(found) == 6
	some o in noise_program.obligations with input as site([program(["education"])])
	o.key == "review"
	o.note == "the program holds nothing on review"
}

test_contents_not_recorded if {
	other := object.union(program([]), {"kind": "hearing_conservation_programme"})
	holds(site([other])) == {["contents", null]}
}

test_not_owed if {
	quiet := object.union(site([]), {"enrolled_now": 0})
	holds(quiet) == set()
	count(noise_program.not_owed) == 1 with input as quiet
}
