package duty.administrative_controls_posted_test

import data.duty.administrative_controls_posted
import rego.v2

control(kind, installed) := {"kind": kind, "what": "rotation", "installed_on": installed, "ref": "control/1", "date": "2024-01-10"}

paper := {
	"kind": "controls_posted",
	"date": "2024-02-01",
	"ref": "document/1",
	"posted_on": "2024-02-01",
	"posted_to": null,
	"covers": ["copies_to_miners"],
}

group(controls, papers) := {"as_of": "2026-06-30", "controls": controls, "documents": papers}

used(papers) := group([control("administrative", "2024-01-15")], papers)

holds(dossier) := found if found := {o.key: o.holds | some o in administrative_controls_posted.obligations} with input as dossier

test_posted_and_copies_given if {
	holds(used([paper])) == {"posted": true, "copies": true}
	some o in administrative_controls_posted.obligations with input as used([paper])
	o.because == ["control/1", "document/1"]
}

test_nothing_on_record if holds(used([])) == {"posted": false, "copies": false}

test_taken_down if {
	holds(used([object.union(paper, {"posted_to": "2026-06-30"})])).posted == false
	holds(used([object.union(paper, {"posted_to": "2026-07-01"})])).posted == true
}

test_day_of_posting_not_recorded if holds(used([object.union(paper, {"posted_on": null})])).posted == null

test_copies_not_recorded if {
	holds(used([object.union(paper, {"covers": []})])).copies == null
	holds(used([object.union(paper, {"covers": ["rotation"]})])).copies == false
}

test_no_administrative_control if {
	every controls in [[], [control("engineering", "2024-01-15")], [control("administrative", null)]] {
		holds(group(controls, [])) == {}
		count(administrative_controls_posted.not_owed) == 1 with input as group(controls, [])
	}
	count(administrative_controls_posted.not_owed) == 0 with input as used([])
}
