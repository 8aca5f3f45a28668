package duty.custom_plug_check_test

import data.duty.custom_plug_check
import rego.v2

worker(types, fit_test, failed) := {"protection": {
	"date": "2024-01-10", "ref": "protector_issue/p1", "types": types, "fit_test": fit_test, "fit_failed": failed,
}}

check := {"date": "2024-01-10", "ref": "fit_test/t1"}

keys(dossier) := found if found := {o.key | some o in custom_plug_check.obligations} with input as dossier

test_never_checked if {
	some o in custom_plug_check.obligations with input as worker(["earmuff", "custom"], null, null)
	o.key == "on delivery"
	o.by == null
	keys(worker(["custom"], null, null)) == {"on delivery"}
	count(custom_plug_check.not_owed) == 0 with input as worker(["custom"], null, null)
}

test_checked if {
	keys(worker(["custom"], check, null)) == {"on delivery", "after 2024-01-10"}
	some o in custom_plug_check.obligations with input as worker(["custom"], check, null)
	o.within == "custom_check_interval"
	o.after == "2024-01-10"
}

test_not_passed if {
	some o in custom_plug_check.obligations with input as worker(["custom"], check, check)
	o.key == "outcome"
	o.holds == false
	o.because == ["fit_test/t1"]
}

test_other_protectors if {
	every dossier in [worker(["custom", "earmuff"], check, null), worker([null], null, null), {"protection": null}] {
		keys(dossier) == set()
		count(custom_plug_check.not_owed) == 1 with input as dossier
	}
}
