package duty.protector_class_test

import data.duty.protector_class
import rego.v2

worker(level, class, types) := {
	"as_of": "2026-06-30", "protection": {"date": "2024-01-01", "ref": "protector_issue/p", "class": class, "types": types},
	"exposed": {"protectors": [{"from": "2023-03-31", "to": null, "current": true}]},
	"exposures": [
		{"from": "2020-01-01", "to": "2023-01-01", "channels": {"day": {"at_most": 120}}},
		{"from": "2023-01-01", "to": null, "channels": {"day": {"at_most": level}}},
	],
}

holds(dossier) := found if found := {[o.key, object.get(o, "holds", "opinion")] | some o in protector_class.obligations} with input as dossier

test_rows_of_the_table if {
	every row in [[90, "C"], [90.1, "B"], [95, "2"], [100, "3"], [100.1, "4"], [105, "A"]] {
		holds(worker(row[0], row[1], ["formable"])) == {["class", true]}
	}
	every row in [[90.1, "C"], [95.1, "B"], [95.1, "2"], [100.1, "3"], [95, "1"]] {
		holds(worker(row[0], row[1], ["formable"])) == {["class", false]}
	}
	count(protector_class.not_owed) == 0 with input as worker(90, "C", ["formable"])
}

test_not_recorded if {
	holds(worker(90, null, ["formable"])) == {["class", null]}
	holds(worker(null, "A", ["formable"])) == {["class", null]}
	{o.missing | some o in protector_class.obligations} == {["the worker's Lex"]} with input as worker(null, "A", ["formable"])
}

test_two_protectors if {
	holds(worker(105.1, "A", ["formable"])) == {["two protectors", false]}
	holds(worker(110, "A", ["formable", "earmuff"])) == {["two protectors", true]}
	holds(worker(110, "A", ["formable", "custom"])) == {["two protectors", false]}
	holds(worker(110, "A", ["dual"])) == {["two protectors", true]}
	holds(worker(110.1, "A", ["dual"])) == {["two protectors", true], ["limited time", "opinion"]}
}

test_not_owed if {
	every changes in [{"protection": null}, {"exposed": {"protectors": []}}] {
		dossier := object.union(worker(90, "C", []), changes)
		holds(dossier) == set()
		count(protector_class.not_owed) == 1 with input as dossier
	}
}
