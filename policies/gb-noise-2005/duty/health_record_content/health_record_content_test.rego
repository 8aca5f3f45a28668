package duty.health_record_content_test

import data.duty.health_record_content as duty
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

examination(result, by) := {"id": "e1", "ref": "examination/e1", "attended_on": "2024-02-01", "result": result, "by_is": by}

test_complete if obligation({"examinations": [examination("no_concern", "technician")]}).holds == true

test_incomplete if {
	obligation({"examinations": [examination(null, "technician")]}).note == "the record lacks the outcome"
	obligation({"examinations": [examination("no_concern", null)]}).holds == false
	obligation({"examinations": [examination(null, null)]}).note == "the record lacks the outcome and who did it"
}

test_nothing_attended if {
	quiet({"examinations": []})
	quiet({"examinations": [object.union(examination(null, null), {"attended_on": null})]})
}
