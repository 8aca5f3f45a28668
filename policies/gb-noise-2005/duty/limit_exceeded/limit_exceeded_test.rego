package duty.limit_exceeded_test

import data.duty.limit_exceeded as duty
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

every_word := data.parameters.limit_exceeded_actions.values[0].value

paper(day, covers) := {"kind": "limit_exceeded", "date": day, "ref": "document/x", "covers": covers}

group(documents) := {"workers": 4, "documents": documents}

test_all_three if obligation(group([paper("2024-01-10", every_word)])).holds == true

test_each_of_the_three_counts if {
	every word in every_word {
		found := obligation(group([paper("2024-01-10", [other | some other in every_word; other != word])]))
		found.holds == false
		found.note == sprintf("a limit value was exceeded on 2024-01-10, and the record lacks: %s", [replace(word, "_", " ")])
	}
}

test_actions_not_recorded if obligation(group([paper("2024-01-10", [])])).missing == ["what was done"]

test_before_the_law if obligation(group([paper("2005-01-10", every_word)])).holds == null

test_every_event_for_itself if {
	count(duty.obligations) == 2 with input as group([paper("2024-01-10", every_word), paper("2025-01-10", every_word)])
}

test_no_event if quiet(group([{"kind": "another", "date": "2024-01-10", "ref": "document/y", "covers": []}]))
