package duty.training_updated_test

import data.duty.training_updated as duty
import rego.v2

now := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2020-01-01", "to": "2021-01-01", "current": false}

open := {"from": "2024-01-01", "to": null, "reason": "not measured"}

obligation(dossier) := only if {
	all := duty.obligations with input as dossier
	some only in all
	count(all) == 1
}

quiet(dossier) if {
	count(duty.obligations) == 0 with input as dossier
	count(duty.not_owed) == 1 with input as dossier
}

change(effect) := {"id": "c1", "date": "2025-03-01", "ref": "change/c1", "what": "a second press", "raises_exposure": effect}

group(spells, changes) := {"workers": 4, "exposed": {"lower": spells}, "changes": changes}

test_changed if {
	found := obligation(group([now], [change("yes"), object.union(change("no"), {"id": "c2"})]))
	found.key == "c1"
	found.after == "2025-03-01"
	found.by == "document.instruction"
	duty.not_owed == set() with input as group([now], [change("yes")])
}

test_no_change_that_raises_exposure if {
	quiet(group([now], []))
	quiet(group([now], [change("no")]))
	quiet(group([now], [change(null)]))
}

test_not_exposed if quiet(group([past], [change("yes")]))
