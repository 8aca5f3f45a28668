package duty.warning_signs_test

import data.duty.warning_signs
import rego.v2

area(papers) := {
	"as_of": "2026-06-30",
	"workers": 4, "documents": papers,
	"exposed": {"limit": [{"from": "2020-01-01", "to": null, "current": true}]},
}

holds(dossier) := found if found := {[o.holds, o.because] | some o in warning_signs.obligations} with input as dossier

test_signs if {
	holds(area([{"kind": "zone_signs", "ref": "document/s", "posted_to": null}])) == {[true, ["document/s"]]}
	holds(area([{"kind": "advice", "ref": "document/a", "posted_to": null}])) == {[false, []]}
	{o.note | some o in warning_signs.obligations} == {null} with input as area([{"kind": "zone_signs", "ref": "document/s", "posted_to": null}])
	count(warning_signs.not_owed) == 0 with input as area([])
}

test_signs_taken_down if {
	holds(area([{"kind": "zone_signs", "ref": "document/s", "posted_to": "2026-06-30"}])) == {[true, ["document/s"]]}
	holds(area([{"kind": "zone_signs", "ref": "document/s", "posted_to": "2026-06-29"}])) == {[false, []]}
}

test_not_owed if {
	every spells in [[], [{"from": "2020-01-01", "to": "2021-01-01", "current": false}]] {
		quiet := object.union(area([]), {"exposed": {"limit": spells}})
		holds(quiet) == set()
		count(warning_signs.not_owed) == 1 with input as quiet
	}
}
