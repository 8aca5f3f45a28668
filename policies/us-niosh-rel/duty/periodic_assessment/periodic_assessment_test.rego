package duty.periodic_assessment_test

import data.duty.periodic_assessment as duty
import rego.v2

spell := {"from": "2022-01-10", "to": null, "current": true}

group(spells, first) := {"exposed": {"rel": spells}, "first_survey": {"date": first, "ref": "measurement/m1"}, "workers": 4}

during(g) := found if found := {o.during | some o in duty.obligations} with input as g

test_every_stretch if {
	found := duty.obligations with input as group([spell], "2022-01-10")
	found == {{"every": "assessment_interval", "during": {"from": "2022-01-10", "to": null}, "by": "measurement.any", "facts": {"workers": 4}}}
	duty.not_owed == set() with input as group([spell], "2022-01-10")
}

test_not_before_the_first_result if {
	during(group([spell], "2022-03-01")) == {{"from": "2022-03-01", "to": null}}
	during(group([spell], "2020-03-01")) == {{"from": "2022-01-10", "to": null}}
}

test_ended if {
	ended := object.union(spell, {"to": "2023-01-10", "current": false})
	during(group([ended], "2022-01-10")) == {{"from": "2022-01-10", "to": "2023-01-10"}}
	during(group([ended], "2023-01-09")) == {{"from": "2023-01-09", "to": "2023-01-10"}}
	during(group([ended], "2023-01-10")) == set()
}

test_not_owed if {
	during(group([], "2022-01-10")) == set()
	count(duty.not_owed) == 1 with input as group([], "2022-01-10")
	unmeasured := {"exposed": {"rel": [spell]}, "first_survey": null, "workers": 4}
	during(unmeasured) == set()
	count(duty.not_owed) == 1 with input as unmeasured
}
