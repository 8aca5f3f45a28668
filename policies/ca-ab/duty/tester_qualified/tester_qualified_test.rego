package duty.tester_qualified_test

import data.duty.tester_qualified
import rego.v2

link := {"date": "2024-03-05", "ref": "audiogram/a1"}

tester(changes) := object.union(
	{
		"registered": true, "qualification": "technician", "certificate": "AT 1", "supervisor": "p1", "supervisor_is": "audiologist",
		"tests": 4, "workers": 4, "first_test": link, "last_test": link, "tests_outside_validity": 0, "first_outside": null,
	},
	changes,
)

holds(dossier, key) := found if found := {o.holds | some o in tester_qualified.obligations; o.key == key} with input as dossier

test_technician_with_certificate if {
	holds(tester({}), "qualification") == {true}
	holds(tester({}), "consultation") == {true}
	holds(tester({"supervisor_is": "licensed_professional"}), "consultation") == {true}
	count(tester_qualified.not_owed) == 0 with input as tester({})
}

test_professional if {
	holds(tester({"qualification": "audiologist", "certificate": null}), "qualification") == {true}
	holds(tester({"qualification": "audiologist"}), "consultation") == set()
}

test_not_known if {
	holds(tester({"registered": false}), "qualification") == {null}
	holds(tester({"qualification": null}), "qualification") == {null}
	holds(tester({"certificate": null}), "qualification") == {null}
	holds(tester({"supervisor_is": null}), "consultation") == {null}
}

test_not_qualified if {
	holds(tester({"tests_outside_validity": 2}), "qualification") == {false}
	holds(tester({"qualification": "other"}), "qualification") == {false}
	holds(tester({"supervisor": null}), "consultation") == {false}
	holds(tester({"supervisor_is": "technician"}), "consultation") == {false}
}

test_not_owed if {
	idle := tester({"tests": 0})
	holds(idle, "qualification") == set()
	holds(idle, "consultation") == set()
	count(tester_qualified.not_owed) == 1 with input as idle
}
