package duty.professional_designated_test

import data.duty.professional_designated
import rego.v2

site(papers) := {"enrolled_now": 4, "documents": papers}

holds(dossier) := found if found := {[o.holds, o.note == null] | some o in professional_designated.obligations} with input as dossier

test_designation if {
	holds(site([{"kind": "designation", "ref": "document/d"}])) == {[true, true]}
	holds(site([{"kind": "advice", "ref": "document/a"}])) == {[false, false]}
	{o.because | some o in professional_designated.obligations} == {["document/d"]} with input as site([{"kind": "designation", "ref": "document/d"}])
	count(professional_designated.not_owed) == 0 with input as site([])
}

test_not_owed if {
	quiet := object.union(site([]), {"enrolled_now": 0})
	holds(quiet) == set()
	count(professional_designated.not_owed) == 1 with input as quiet
}
