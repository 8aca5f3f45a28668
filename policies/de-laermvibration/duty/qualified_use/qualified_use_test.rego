package duty.qualified_use_test

import data.duty.qualified_use
import rego.v2

worker(from, current) := {"exposed": {"qualified_use": [{"from": from, "to": null, "current": current}]}}

since(dossier) := found if found := {o.during.from | some o in qualified_use.obligations} with input as dossier with data.parameters.qualified_use_interval as {"values": [{"from": "2017-09-05"}]}

test_from_the_start if since(worker("2024-01-01", true)) == {"2024-01-01"}

test_not_before_the_rule if since(worker("2011-01-01", true)) == {"2017-09-05"}

test_not_at_that_level_now if {
	since(worker("2024-01-01", false)) == set()
	count(qualified_use.not_owed) == 1 with input as worker("2024-01-01", false)
	count(qualified_use.not_owed) == 0 with input as worker("2024-01-01", true)
}
