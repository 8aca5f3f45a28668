package duty.test_repeated_test

import data.duty.test_repeated as duty
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

audiogram(id, day, left, right) := {
	"id": id, "date": day, "ref": sprintf("audiogram/%s", [id]), "invalidated": false,
	"schemes": {"worsened": {"left": left, "right": right}},
}

core(left) := {"schemes": {"worsened_core": {"left": left, "right": false}}}

first := audiogram("a1", "2020-02-01", null, null)

worker(spells, audiograms) := {"exposed": {"upper": spells}, "audiograms": audiograms, "examinations": []}

test_worse if {
	found := obligation(worker([now], [first, audiogram("a2", "2024-02-01", true, null)]))
	found.after == "2024-02-01"
	found.within == "repeat_time"
	found.by == null
	found.health.ears == ["left"]
}

test_repeated if {
	examinations := [{"ref": "examination/e1", "kind": "hearing_test", "attended_on": "2024-04-01"}]
	found := obligation(object.union(worker([now], [first, audiogram("a2", "2024-02-01", true, false)]), {"examinations": examinations}))
	found.by == {"date": "2024-04-01", "ref": "examination/e1"}
}

test_not_comparable if {
	obligation(worker([now], [first, audiogram("a2", "2024-02-01", null, false)])).holds == null
}

test_the_test_before_is_of_an_earlier_edition if {
	second := audiogram("a2", "2021-02-01", null, null)
	quiet(worker([now], [first, object.union(second, core(false))]))
	obligation(worker([now], [first, object.union(second, core(null))])).holds == null
	third := object.union(audiogram("a3", "2024-02-01", null, null), core(false))
	obligation(worker([now], [first, object.union(second, core(false)), third])).key == "a3"
}

test_not_worse if {
	quiet(worker([now], [first, audiogram("a2", "2024-02-01", false, false)]))
	quiet(worker([now], [first]))
	quiet(worker([past], [first, audiogram("a2", "2024-02-01", true, true)]))
	quiet(worker([now], [first, audiogram("a2", "2020-12-31", true, true)]))
}
