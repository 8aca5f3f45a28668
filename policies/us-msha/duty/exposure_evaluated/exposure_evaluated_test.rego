package duty.exposure_evaluated_test

import data.duty.exposure_evaluated
import rego.v2

survey := {"date": "2024-01-10", "ref": "measurement/m1"}

group(first, suspected, measurements) := {
	"workers": 12,
	"first_survey": first,
	"suspected_noisy": suspected,
	"measurements": measurements,
}

holds(dossier) := found if found := {o.holds | some o in exposure_evaluated.obligations} with input as dossier

test_measured if {
	every suspected in [true, false, null] { holds(group(survey, suspected, [survey])) == {true} }
}

test_measured_group_is_never_not_owed if {
	count(exposure_evaluated.not_owed) == 0 with input as group(survey, false, [survey])
}

test_quiet_group_with_a_measurement_that_gives_nothing if {
	holds(group(null, false, [survey])) == set()
	count(exposure_evaluated.not_owed) == 1 with input as group(null, false, [survey])
}

test_worked_out_from_tasks if holds(group(survey, true, [])) == {true}

test_suspected_and_never_measured if holds(group(null, true, [])) == {false}

test_measured_without_result if holds(group(null, true, [survey])) == {null}

test_nobody_has_said_whether_it_may_be_noisy if holds(group(null, null, [])) == {null}

test_nothing_suggests_noise if {
	holds(group(null, false, [])) == set()
	count(exposure_evaluated.not_owed) == 1 with input as group(null, false, [])
	count(exposure_evaluated.not_owed) == 0 with input as group(null, true, [])
	count(exposure_evaluated.not_owed) == 0 with input as group(null, null, [])
}
