package duty.shift_review_test

import data.duty.shift_review as duty
import rego.v2

shift := {"id": "a2", "date": "2024-03-31", "ref": "audiogram/a2", "confirms": {"date": "2024-03-01", "ref": "audiogram/a1"}, "ears": "left", "at_least": false, "hearing": {"left_db": 20}}

worker(reviewed_on, reviewer_is) := {
	"shifts": [shift],
	"unconfirmed": [],
	"audiograms": [
		{"ref": "audiogram/a1", "reviewed_on": "2024-03-02", "reviewer_is": "audiologist"},
		{"ref": "audiogram/a2", "reviewed_on": reviewed_on, "reviewer_is": reviewer_is},
	],
}

obligation(w) := only if {
	all := duty.obligations with input as w
	some only in all
	count(all) == 1
}

test_asked if {
	found := obligation(worker(null, null))
	found.by == null
	found.key == "a2"
	found.because == ["audiogram/a1", "audiogram/a2"]
	found.health == {"left_db": 20}
	not "left_db" in object.keys(found.facts)
}

test_answered[profession] if {
	some profession in ["audiologist", "physician", "otolaryngologist"]
	obligation(worker("2024-04-02", profession)).by == {"date": "2024-04-02", "ref": "audiogram/a2"}
}

test_not_answered_by_others if {
	obligation(worker("2024-04-02", "technician")).by == null
	obligation(worker("2024-04-02", null)).by == null
	obligation(worker(null, "audiologist")).by == null
}

test_not_owed if {
	none := {"shifts": [], "unconfirmed": [], "audiograms": []}
	duty.obligations == set() with input as none
	duty.not_owed == {"no shift is confirmed by a second test"} with input as none
	waiting := object.union(none, {"unconfirmed": [{"id": "a1"}]})
	count(duty.not_owed) == 2 with input as waiting
	duty.not_owed == set() with input as worker(null, null)
}
