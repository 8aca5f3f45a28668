package duty.assessment_review_interval_test

import data.duty.assessment_review_interval as duty
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

paper(kind) := {"kind": kind, "date": "2022-01-10", "ref": "document/ra"}

group(spells, documents) := {"exposed": {"lower": spells}, "documents": documents}

test_from_the_first_assessment_on if {
	found := obligation(group([past, now], [paper("risk_assessment"), object.union(paper("risk_assessment"), {"date": "2023-01-10"})]))
	found.every == "assessment_review_interval"
	found.during == {"from": "2022-01-10", "to": null}
	duty.not_owed == set() with input as group([now], [paper("risk_assessment")])
}

test_from_the_start_of_the_noise_on if {
	later := object.union(now, {"from": "2024-03-01"})
	obligation(group([later], [paper("risk_assessment")])).during == {"from": "2024-03-01", "to": null}
}

test_no_assessment if quiet(group([now], [paper("another")]))

test_nobody_exposed_now if quiet(group([past], [paper("risk_assessment")]))
