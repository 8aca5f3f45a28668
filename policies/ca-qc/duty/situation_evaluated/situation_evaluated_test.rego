package duty.situation_evaluated_test

import data.duty.situation_evaluated
import rego.v2

early := {"date": "2022-02-01", "ref": "document/noise_evaluation", "early": true, "ends": "2028-06-16"}

group(spells, evaluations, choice) := {
	"as_of": "2026-06-30", "exposed": {"limit": spells},
	"evaluations": evaluations, "choices": {"early_evaluation": choice},
}

firsts(dossier) := found if found := {[o.first, o.during.from, o.during.to] | some o in situation_evaluated.obligations} with input as dossier

test_above_since_before if {
	firsts(group([{"from": "2020-01-01", "to": null}], [], "not_counted")) == {["first_identification_time", "2023-06-16", null]}
	firsts(group([{"from": "2020-01-01", "to": null}], [early], "not_counted")) == {["first_identification_time", "2023-06-16", null]}
}

test_early_evaluation_counted if {
	firsts(group([{"from": "2020-01-01", "to": null}], [early], "counted")) == {["evaluation_interval", "2023-06-16", null]}
	late := object.union(early, {"early": false})
	firsts(group([{"from": "2020-01-01", "to": null}], [late], "counted")) == {["first_identification_time", "2023-06-16", null]}
}

test_found_later if {
	dossier := group([{"from": "2024-01-01", "to": "2025-01-01"}], [], "not_counted")
	firsts(dossier) == {["evaluation_interval", "2024-01-01", "2025-01-01"]}
	count(situation_evaluated.not_owed) == 0 with input as dossier
}

test_not_owed if {
	every spells in [[], [{"from": "2020-01-01", "to": "2023-06-16"}]] {
		firsts(group(spells, [], "not_counted")) == set()
		count(situation_evaluated.not_owed) == 1 with input as group(spells, [], "not_counted")
	}
	before := object.union(group([{"from": "2020-01-01", "to": null}], [], "not_counted"), {"as_of": "2023-06-15"})
	firsts(before) == set()
}
