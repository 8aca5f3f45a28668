package duty.information_yearly_test

import data.duty.information_yearly
import rego.v2

worker(from, current) := {"training": {"date": "2024-01-08", "ref": "training/t1"}, "exposed": {"lower_reached": [{"from": from, "to": null, "current": current}]}}

since(dossier) := found if found := {o.during.from | some o in information_yearly.obligations} with input as dossier with data.parameters.instruction_interval as {"values": [{"from": "2017-09-05"}]}

test_from_the_start if {
	since(worker("2024-01-01", true)) == {"2024-01-01"}
	some o in information_yearly.obligations with input as worker("2024-01-01", true)
	o.every == "instruction_interval"
	o.by == "training.any"
}

test_never_instructed_is_another_finding if {
	never := object.union(worker("2024-01-01", true), {"training": null})
	since(never) == set()
	count(information_yearly.not_owed) == 1 with input as never
}

test_not_before_the_rule if since(worker("2011-01-01", true)) == {"2017-09-05"}

test_not_exposed_now if {
	since(worker("2024-01-01", false)) == set()
	count(information_yearly.not_owed) == 1 with input as worker("2024-01-01", false)
	count(information_yearly.not_owed) == 0 with input as worker("2024-01-01", true)
}
