package duty.change_identified_test

import data.duty.change_identified
import rego.v2

change := {
	"id": "c1", "ref": "change/c1", "date": "2025-03-01", "what": "a third line", "raises_exposure": "yes",
	"identified_on": null, "enrolling": false, "measured": null, "period_ends": null, "period_short": null,
}

group(changes, suspected) := {
	"changes": [object.union(change, changes)], "suspected_noisy": suspected,
	"exposure_unknown": {"limit": [{"from": "2025-03-01", "to": "2025-06-01", "reason": "not measured since"}]},
}

entries(dossier) := found if found := {[o.after, o.by] | some o in change_identified.obligations; "by" in object.keys(o)} with input as dossier

test_not_identified if {
	entries(group({}, true)) == {["2025-03-01", null]}
	entries(group({"enrolling": true}, null)) == {["2025-03-01", null]}
	count(change_identified.not_owed) == 0 with input as group({}, true)
}

test_identified if {
	entries(group({"identified_on": "2025-03-31"}, true)) == {["2025-03-01", {"date": "2025-03-31", "ref": "change/c1"}]}
	entries(group({"identified_on": "2025-03-31", "raises_exposure": "unknown"}, true)) == {["2025-03-01", {"date": "2025-03-31", "ref": "change/c1"}]}
}

test_not_known_whether_it_raises if {
	every raises in [null, "unknown"] {
		{o.holds | some o in change_identified.obligations} == {null} with input as group({"raises_exposure": raises}, true)
	}
}

test_not_known_whether_it_is_noisy if {
	every later in [null, {"date": "2025-05-31", "ref": "measurement/m"}] {
		{[o.holds, o.missing] | some o in change_identified.obligations} == {[null, ["whether noise is suspected in this situation"]]} with input as group({"measured": later}, null)
	}
}

test_measured_since_and_within_the_limits if {
	quiet := group({"measured": {"date": "2025-06-01", "ref": "measurement/m"}}, null)
	count(change_identified.obligations) == 0 with input as quiet
	count(change_identified.not_owed) == 1 with input as quiet
}

test_not_owed if {
	every dossier in [group({"raises_exposure": "no"}, true), group({"date": "2023-06-15"}, true), group({}, false)] {
		count(change_identified.obligations) == 0 with input as dossier
		count(change_identified.not_owed) == 1 with input as dossier
	}
	entries(group({"enrolling": true}, false)) == {["2025-03-01", null]}
}
