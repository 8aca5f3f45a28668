package duty.monitoring_repeated_test

import data.duty.monitoring_repeated
import rego.v2

measured := {"date": "2024-07-01", "ref": "measurement/m2"}

change(raises, measurement) := {
	"id": "c1", "ref": "change/c1", "date": "2024-06-01", "what": "a second press",
	"raises_exposure": raises, "measured": measurement,
}

group(changes) := {"changes": changes, "workers": 12}

test_raised_and_not_measured if {
	some o in monitoring_repeated.obligations with input as group([change("yes", null)])
	o.after == "2024-06-01"
	o.by == null
	count(monitoring_repeated.not_owed) == 0 with input as group([change("yes", null)])
}

test_raised_and_measured if {
	some o in monitoring_repeated.obligations with input as group([change("yes", measured)])
	o.by == measured
}

test_effect_not_known if {
	every raises in ["unknown", null] {
		{o.holds | some o in monitoring_repeated.obligations} == {null} with input as group([change(raises, null)])
		{o.holds | some o in monitoring_repeated.obligations} == {true} with input as group([change(raises, measured)])
		count(monitoring_repeated.not_owed) == 0 with input as group([change(raises, null)])
	}
}

test_quieter if {
	count(monitoring_repeated.obligations) == 0 with input as group([change("no", null)])
	count(monitoring_repeated.not_owed) == 1 with input as group([change("no", null)])
}

test_each_change_on_its_own if {
	other := object.union(change("yes", measured), {"id": "c2"})
	{o.key | some o in monitoring_repeated.obligations} == {"c1", "c2"} with input as group([change("yes", null), other])
}

test_no_change if count(monitoring_repeated.not_owed) == 1 with input as group([])
