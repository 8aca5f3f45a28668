package duty.assessment_recorded_test

import data.duty.assessment_recorded as duty
import rego.v2

now := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2020-01-01", "to": "2021-01-01", "current": false}

every_head := data.parameters.assessment_record.values[0].value

paper(day, covers) := {"kind": "risk_assessment", "date": day, "ref": sprintf("document/%s", [day]), "covers": covers}

group(documents) := object.union({"suspected_noisy": null, "exposed": {"lower": [now]}, "exposure_unknown": {"lower": []}}, {"as_of": "2026-06-30", "documents": documents})

obligation(dossier) := only if {
	all := duty.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_every_head if {
	found := obligation(group([paper("2024-01-10", every_head)]))
	found.holds == true
	found.because == ["document/2024-01-10"]
}

test_every_single_head_counts if {
	every head in every_head {
		rest := [other | some other in every_head; other != head]
		found := obligation(group([paper("2024-01-10", rest)]))
		found.holds == false
		found.note == sprintf("the risk assessment of 2024-01-10 leaves out: %s", [replace(head, "_", " ")])
	}
}

test_the_latest_counts if {
	obligation(group([paper("2022-01-10", every_head), paper("2024-01-10", ["another"])])).holds == false
	obligation(group([paper("2022-01-10", ["another"]), paper("2024-01-10", every_head)])).holds == true
}

test_contents_not_recorded if obligation(group([paper("2024-01-10", [])])).missing == ["what the risk assessment covers"]

test_before_the_law if {
	obligation(object.union(group([paper("2004-01-10", every_head)]), {"as_of": "2006-04-05"})).holds == null
}

test_none_there if {
	others := group([{"kind": "another", "date": "2024-01-10", "ref": "document/d2", "covers": []}])
	duty.obligations == set() with input as others
	count(duty.not_owed) == 1 with input as others
}

test_not_concerned if {
	out := object.union(group([paper("2024-01-10", [])]), {"suspected_noisy": true, "exposed": {"lower": [past]}})
	duty.obligations == set() with input as out
	count(duty.not_owed) == 1 with input as out
}

test_suspected_is_enough_while_the_noise_is_not_known if {
	suspected := {"suspected_noisy": true, "exposed": {"lower": []}, "exposure_unknown": {"lower": [{"from": "2024-01-01", "to": null, "reason": "not measured"}]}}
	obligation(object.union(group([paper("2024-01-10", every_head)]), suspected)).holds == true
}
