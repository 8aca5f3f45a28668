package duty.weekly_average_test

import data.duty.weekly_average
import rego.v2

group(elected, current, vary, documents, level) := {
	"choices": {"weekly_average": elected}, "days_vary": vary, "documents": documents,
	"now": {"ref": "measurement/m1", "channels": {"week": {"at_most": level}}},
	"exposed": {"daily_lower_reached": [{"from": "2024-01-01", "to": null, "current": current}]},
}

paper := {"kind": "weekly_permission", "date": "2024-05-02", "ref": "document/d1"}

held(dossier) := found if found := {o.key: o.holds | some o in weekly_average.obligations; o.key != "level of the week"} with input as dossier

test_conditions_met if {
	held(group(true, true, true, [paper], 84.9)) == {"days vary": true, "permission": true}
	some o in weekly_average.obligations with input as group(true, true, true, [paper], 84.9)
	o.value == 84.9
	o.at_most == "weekly_limit"
	o.because == ["measurement/m1"]
	count(weekly_average.not_owed) == 0 with input as group(true, true, true, [paper], 84.9)
}

test_conditions_not_met if {
	held(group(true, true, false, [], 84.9)) == {"days vary": false, "permission": false}
	notes := {o.note | some o in weekly_average.obligations; o.key != "level of the week"} with input as group(true, true, false, [], 84.9)
	count({note | some note in notes; note != null}) == 2
	quiet := {o.note | some o in weekly_average.obligations; o.key != "level of the week"} with input as group(true, true, true, [paper], 84.9)
	quiet == {null}
}

test_not_known_whether_days_vary if {
	held(group(true, true, null, [paper], null))["days vary"] == null
	some o in weekly_average.obligations with input as group(true, true, null, [paper], null)
	o.key == "days vary"
	count(o.missing) == 1
}

test_not_elected if {
	held(group(false, true, false, [], 90)) == {}
	count(weekly_average.not_owed) == 1 with input as group(false, true, false, [], 90)
}

test_no_noisy_day if {
	held(group(true, false, false, [], 70)) == {}
	count(weekly_average.not_owed) == 1 with input as group(true, false, false, [], 70)
}
