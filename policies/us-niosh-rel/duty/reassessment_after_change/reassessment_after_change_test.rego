package duty.reassessment_after_change_test

import data.duty.reassessment_after_change as duty
import rego.v2

change := {"id": "c1", "date": "2024-03-01", "ref": "change/c1", "what": "new press", "raises_exposure": "yes", "measured": null, "enrolling": true}

group(more) := {"changes": [object.union(change, more)], "workers": 4}

link := {"date": "2024-06-01", "ref": "measurement/m2"}

obligation(g) := only if {
	all := duty.obligations with input as g
	some only in all
	count(all) == 1
}

test_clock_starts_with_the_change if {
	found := obligation(group({}))
	found.after == "2024-03-01"
	found.within == "reassessment_time"
	found.by == null
	obligation(group({"measured": link})).by == link
}

test_effect_not_known[effect] if {
	some effect in ["unknown", null]
	found := obligation(group({"raises_exposure": effect}))
	found.holds == null
	found.missing == ["whether the change raises exposure"]
	obligation(group({"raises_exposure": effect, "measured": link})).by == link
}

test_not_owed[what] if {
	some what, more in {"raises nothing": {"raises_exposure": "no"}, "below the REL": {"enrolling": false}}
	duty.obligations == set() with input as group(more)
	count(duty.not_owed) == 1 with input as group(more)
}

test_owed_and_so_not_silent if {
	duty.not_owed == set() with input as group({})
	count(duty.not_owed) == 1 with input as {"changes": [], "workers": 4}
}
