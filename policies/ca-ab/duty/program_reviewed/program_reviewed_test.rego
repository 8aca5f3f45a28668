package duty.program_reviewed_test

import data.duty.program_reviewed
import rego.v2

site(papers, number) := {"enrolled_now": number, "documents": papers}

program := {"kind": "written_program", "date": "2020-01-01", "ref": "document/p"}

test_every_year_since_the_program if {
	some o in program_reviewed.obligations with input as site([program], 4)
	o.every == "program_review_interval"
	o.during == {"from": "2020-01-01", "to": null}
	count(program_reviewed.not_owed) == 0 with input as site([program], 4)
}

test_program_from_before_the_law if {
	some o in program_reviewed.obligations with input as site([object.union(program, {"date": "2008-02-10"})], 4)
	o.during.from == "2009-07-01"
}

test_not_owed if {
	every dossier in [site([], 4), site([program], 0)] {
		count(program_reviewed.obligations) == 0 with input as dossier
		count(program_reviewed.not_owed) == 1 with input as dossier
	}
}
