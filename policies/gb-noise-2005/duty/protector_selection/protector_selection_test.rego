package duty.protector_selection_test

import data.duty.protector_selection as duty
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

paper(kind) := {"kind": kind, "date": "2024-01-10", "ref": "document/s"}

group(spells, holders, documents) := {"exposed": {"lower": spells}, "protector_holders": holders, "documents": documents}

test_no_record if {
	obligation(group([now], 1, [])).holds == false
	obligation(group([now], 1, [paper("another")])).holds == false
}

test_on_record if {
	every kind in ["protector_selection", "attenuation_evaluation"] {
		obligation(group([now], 3, [paper(kind)])).because == ["document/s"]
	}
}

test_nobody_has_one if quiet(group([now], 0, []))

test_not_exposed if quiet(group([past], 3, []))
