package duty.test_attended_test

import data.duty.test_attended as duty
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

offer(answer, attended) := {
	"id": "e1", "ref": "examination/e1", "kind": "hearing_test", "offered_on": "2024-02-01", "answer": answer, "attended_on": attended,
}

worker(examinations, audiograms) := {"exposed": {"lower": [now]}, "examinations": examinations, "audiograms": audiograms}

test_attended if obligation(worker([offer("accepted", "2024-03-01")], [])).holds == true

test_declined if {
	found := obligation(worker([offer("declined", null)], []))
	found.holds == false
	found.note == "the offer of 2024-02-01 was declined or not answered, and no test is on record"
	obligation(worker([offer("no_answer", null)], [])).holds == false
}

test_accepted_and_nothing_on_record if {
	found := obligation(worker([offer("accepted", null)], []))
	found.holds == null
	found.note == "no test is on record since the offer of 2024-02-01, and that it was declined is not, either"
	found.missing == ["the test, or the answer of the worker"]
	obligation(worker([offer(null, null)], [])).holds == null
}

test_tested_later if {
	obligation(worker([offer("declined", null)], [{"date": "2024-02-01"}])).holds == true
	obligation(worker([offer("declined", null)], [{"date": "2024-01-31"}])).holds == false
	later := {"id": "e2", "kind": "hearing_test", "offered_on": null, "attended_on": "2025-01-01"}
	obligation(worker([offer("declined", null), later], [])).holds == true
}

test_offered_again if {
	again := object.union(offer("no_answer", null), {"id": "e2", "offered_on": "2025-02-01"})
	obligation(worker([offer("declined", null), again], [])).key == "e2"
	both := {o.key: o.holds | some o in duty.obligations} with input as worker([offer("declined", null), again], [{"date": "2024-06-01"}])
	both == {"e1": true, "e2": false}
}

test_nothing_offered if {
	quiet(worker([], []))
	quiet(worker([object.union(offer("declined", null), {"kind": "health_appointment"})], []))
	quiet(worker([object.union(offer("declined", null), {"offered_on": null})], []))
}

test_not_exposed_now if {
	quiet(object.union(worker([offer("declined", null)], []), {"exposed": {"lower": [past]}}))
}
