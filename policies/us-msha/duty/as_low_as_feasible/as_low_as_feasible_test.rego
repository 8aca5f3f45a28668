package duty.as_low_as_feasible_test

import data.duty.as_low_as_feasible
import rego.v2

above := {"limit": [{"from": "2020-01-01", "to": null, "current": true}]}

formerly := {"limit": [{"from": "2020-01-01", "to": "2022-01-01", "current": false}]}

enclosure := {"date": "2024-03-05", "ref": "control/enclosure", "what": "enclosure", "feasible": "yes", "installed_on": "2024-05-01"}

study(day) := {"date": day, "ref": "control/study", "what": "study", "feasible": "no", "installed_on": null}

group(exposed, controls) := {"workers": 12, "exposed": exposed, "controls": controls}

asked(dossier) := only if {
	all := as_low_as_feasible.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_question_is_open if {
	found := asked(group(above, [enclosure]))
	found.by == null
	found.because == ["control/enclosure"]
	asked(group(above, [study("2024-04-30"), enclosure])).by == null
}

test_later_study_answers_it if asked(group(above, [enclosure, study("2024-05-01")])).by == {"date": "2024-05-01", "ref": "control/study"}

test_study_that_is_still_open_answers_nothing if {
	asked(group(above, [enclosure, object.union(study("2024-06-01"), {"feasible": "studied"})])).by == null
}

test_nothing_in_place if {
	none := group(above, [study("2024-05-01")])
	count(as_low_as_feasible.obligations) == 0 with input as none
	as_low_as_feasible.not_owed == {"no control is in place, which is the matter of feasible-controls"} with input as none
}

test_not_above_the_limit if {
	every exposed in [{"limit": []}, formerly] {
		count(as_low_as_feasible.obligations) == 0 with input as group(exposed, [enclosure])
		count(as_low_as_feasible.not_owed) == 1 with input as group(exposed, [enclosure])
	}
	count(as_low_as_feasible.not_owed) == 0 with input as group(above, [enclosure])
}

test_feasible_control_that_is_not_in_place_comes_first if {
	planned := {"date": "2024-06-01", "ref": "control/cab", "what": "cab", "feasible": "yes", "installed_on": null}
	waits := group(above, [enclosure, planned])
	count(as_low_as_feasible.obligations) == 0 with input as waits
	as_low_as_feasible.not_owed == {"a feasible control is not in place yet, which is the matter of feasible-controls"} with input as waits
	asked(group(above, [enclosure, planned, object.union(planned, {"date": "2024-07-01", "installed_on": "2024-07-01"})])).by == null
}
