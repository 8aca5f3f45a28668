package duty.fit_tested_test

import data.duty.fit_tested
import rego.v2

worker(fit_test) := {
	"enrolled": [{"from": "2024-01-01", "to": null, "current": true}],
	"protection": {"date": "2024-01-10", "ref": "protector_issue/P1", "protector": "P1", "fit_test": fit_test, "par_db": null},
}

test_owed_from_the_day_it_was_handed_over if {
	some o in fit_tested.obligations with input as worker(null)
	o.after == "2024-01-10"
	o.within == "fit_test_time"
	o.by == null
	o.because == ["protector_issue/P1"]
}

test_fulfilled_by_the_latest_fit_test if {
	some o in fit_tested.obligations with input as worker({"date": "2024-02-01", "ref": "fit_test/P1"})
	o.by.date == "2024-02-01"
	reasons := fit_tested.not_owed with input as worker(null)
	count(reasons) == 0
}

test_no_protector if {
	dossier := object.union(worker(null), {"protection": null})
	found := fit_tested.obligations with input as dossier
	count(found) == 0
	reasons := fit_tested.not_owed with input as dossier
	count(reasons) == 1
}

test_not_in_the_program_now if {
	dossier := object.union(worker(null), {"enrolled": []})
	found := fit_tested.obligations with input as dossier
	count(found) == 0
	reasons := fit_tested.not_owed with input as dossier
	count(reasons) == 1
}
