package duty.exposure_limit_test

import data.duty.exposure_limit
import rego.v2

survey := {"date": "2024-03-05", "ref": "measurement/m1"}

measurement(max_dba) := {"id": "m1", "date": "2024-03-05", "ref": "measurement/m1", "current": true, "max_dba": max_dba}

group(day, max_dba, choice) := {
	"first_survey": survey, "workers": 4, "measurements": [measurement(max_dba)],
	"as_of": "2026-06-30", "now": {"channels": {"day": day}}, "exposed": {"daily": []}, "exposure_unknown": {"daily": []}, "choices": {"protectors_toward_limit": choice},
}

values(dossier) := found if found := {[o.key, o.value] | some o in exposure_limit.obligations} with input as dossier

test_level_and_highest_level if {
	values(group({"level_dba": 85}, 114, "not_counted")) == {["lex", 85], ["m1", 114]}
	values(group({"level_dba": 85}, null, "not_counted")) == {["lex", 85]}
	count(exposure_limit.not_owed) == 0 with input as group({"level_dba": 85}, 114, "not_counted")
}

test_highest_level_from_before_a_change_is_left_out if {
	old := object.union(group({"level_dba": 85}, 120, "not_counted"), {"measurements": [object.union(measurement(120), {"current": false})]})
	values(old) == {["lex", 85]}
}

test_level_known_only_in_part if {
	part := group({"level_dba": null, "at_least": 84, "at_most": 84.9}, null, "not_counted")
	values(part) == {["lex", 84.9]}
	above := object.union(part, {"exposed": {"daily": [{"from": "2024-01-01", "to": null, "current": true}]}})
	values(above) == {["lex", 84]}
	formerly := object.union(part, {"exposed": {"daily": [{"from": "2024-01-01", "to": "2024-02-01", "current": false}]}})
	values(formerly) == {["lex", 84.9]}
	open := object.union(part, {"exposure_unknown": {"daily": [{"from": "2024-01-01", "to": null, "reason": "between the bounds"}]}})
	values(open) == {["lex", null]}
}

test_protectors_counted if {
	some o in exposure_limit.obligations with input as group({"level_dba": 90}, 120, "counted")
	o.key == "protectors"
	o.lifted != ""
	{o.key | some o in exposure_limit.obligations} == {"protectors"} with input as group({"level_dba": 90}, 120, "counted")
}

test_never_measured if {
	unmeasured := object.union(group({"level_dba": 85}, 114, "not_counted"), {"first_survey": null})
	values(unmeasured) == set()
	count(exposure_limit.not_owed) == 1 with input as unmeasured
}
