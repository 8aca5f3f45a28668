package duty.next_test_due_test

import data.duty.next_test_due as duty
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

examination(id, attended, next) := {
	"id": id, "ref": sprintf("examination/%s", [id]), "kind": "hearing_test", "attended_on": attended, "next_due": next,
}

worker(spells, examinations, audiograms) := {"exposed": {"lower": spells}, "examinations": examinations, "audiograms": audiograms}

test_not_yet if {
	found := obligation(worker([now], [examination("e1", "2024-02-01", "2024-08-01")], []))
	found.after == "2024-02-01"
	found.no_later_than == "2024-08-01"
	found.by == null
}

test_tested_again if {
	again := examination("e2", "2024-07-01", null)
	found := obligation(worker([now], [examination("e1", "2024-02-01", "2024-08-01"), again], []))
	found.by == {"date": "2024-07-01", "ref": "examination/e2"}
	earlier := {"date": "2024-06-01", "ref": "audiogram/a1", "invalidated": false}
	obligation(worker([now], [examination("e1", "2024-02-01", "2024-08-01"), again], [earlier])).by.ref == "audiogram/a1"
}

test_nothing_wanted if {
	quiet(worker([now], [], []))
	quiet(worker([now], [examination("e1", "2024-02-01", null)], []))
	quiet(worker([now], [examination("e1", null, "2024-08-01")], []))
}

test_not_exposed if quiet(worker([past], [examination("e1", "2024-02-01", "2024-08-01")], []))
