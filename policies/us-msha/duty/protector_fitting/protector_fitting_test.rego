package duty.protector_fitting_test

import data.duty.protector_fitting
import rego.v2

fitting := {"date": "2024-01-10", "ref": "protector_issue/P1"}

failed := {"date": "2025-01-10", "ref": "fit_test/P1"}

worker(fitted, fit_failed) := {
	"enrolled": [{"from": "2024-01-01", "to": null, "current": true}],
	"protection": {"date": "2024-01-10", "ref": "protector_issue/P1", "protector": "P1", "fitted": fitted, "fit_failed": fit_failed},
}

holds(dossier) := found if found := {o.holds | some o in protector_fitting.obligations} with input as dossier

reasons(dossier) := found if found := protector_fitting.not_owed with input as dossier

test_fitted if {
	holds(worker(fitting, null)) == {true}
	count(reasons(worker(fitting, null))) == 0
}

test_latest_fit_test_not_passed if {
	holds(worker(fitting, failed)) == {false}
	holds(worker(null, failed)) == {false}
}

test_not_recorded if {
	some o in protector_fitting.obligations with input as worker(null, null)
	o.holds == null
	o.missing == ["the initial fitting"]
}

test_no_protector if {
	dossier := object.union(worker(null, null), {"protection": null})
	holds(dossier) == set()
	count(reasons(dossier)) == 1
}

test_not_in_the_program_now if {
	dossier := object.union(worker(null, null), {"enrolled": []})
	holds(dossier) == set()
	count(reasons(dossier)) == 1
}

test_no_longer_in_the_program if {
	left := object.union(worker(fitting, null), {"enrolled": [{"from": "2022-01-01", "to": "2024-01-01", "current": false}]})
	holds(left) == set()
	count(reasons(left)) == 1
}
