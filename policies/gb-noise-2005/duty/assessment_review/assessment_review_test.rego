package duty.assessment_review_test

import data.duty.assessment_review as duty
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

paper(day, reviewed) := {"kind": "risk_assessment", "date": day, "reviewed_on": reviewed, "ref": "document/ra"}

group(changes, documents) := {
	"workers": 4, "as_of": "2026-06-30", "exposed": {"lower": [now]}, "exposure_unknown": {"lower": []},
	"changes": changes, "documents": documents,
}

old := paper("2020-01-01", null)

test_a_change_that_raises_exposure if {
	found := obligation(group([change("yes")], [old]))
	found.after == "2025-03-01"
	found.by == "document.risk_assessment"
	duty.not_owed == set() with input as group([change("yes")], [old])
}

test_effect_not_known if {
	every effect in ["unknown", null] {
		obligation(group([change(effect)], [paper("2025-02-28", null)])).holds == null
		obligation(group([change(effect)], [paper("2025-03-01", null)])).holds == true
		obligation(group([change(effect)], [paper("2020-01-01", "2025-03-01")])).because == ["change/c1", "document/ra"]
		obligation(group([change(effect)], [old, object.union(paper("2025-03-01", null), {"kind": "another"})])).holds == null
	}
}

test_no_change_that_matters if {
	quiet(group([], []))
	quiet(group([change("no")], []))
}

test_no_assessment_to_review if {
	quiet(group([change("yes")], []))
	quiet(group([change("unknown")], [object.union(old, {"kind": "another"})]))
}

test_quiet_group if {
	below := {"exposed": {"lower": [past]}}
	every effect in ["yes", null] {
		quiet(object.union(group([change(effect)], [old]), below))
	}
	not_known := object.union(below, {"exposure_unknown": {"lower": [open]}})
	obligation(object.union(group([change("yes")], [old]), not_known)).by == "document.risk_assessment"
}
