package duty.baseline_kept_test

import data.duty.baseline_kept
import rego.v2

away(to, months) := {"from": "2023-01-01", "to": to, "months": months}

marked := {"date": "2024-03-05", "ref": "audiogram/a3"}

revision(result) := {"date": "2024-03-06", "ref": "follow_up/1", "result": result}

worker(marks, revisions, absences) := {"baseline": {"date": "2020-03-05"}, "marked_later": marks, "revisions": revisions, "absences": absences}

value(dossier) := o.value if some o in baseline_kept.obligations with input as dossier

test_new_baseline_without_absence if {
	value(worker([marked], [], [])) == 0
	some o in baseline_kept.obligations with input as worker([marked], [], [])
	o.above == "absence_for_new_baseline"
	o.because == ["audiogram/a3"]
}

test_absence_is_held_against_the_parameter if {
	value(worker([marked], [], [away("2024-03-05", 7), away("2023-09-01", 2)])) == 7
	value(worker([], [revision("new_baseline")], [away("2024-03-05", 7)])) == 7
}

test_absence_after_the_new_baseline_does_not_count if value(worker([marked], [], [away("2024-03-06", 7)])) == 0

test_other_revisions_are_another_matter if {
	every result in ["persistent", "improved", null] {
		dossier := worker([], [revision(result)], [])
		baseline_kept.obligations == set() with input as dossier
		count(baseline_kept.not_owed) == 1 with input as dossier
	}
	count(baseline_kept.not_owed) == 0 with input as worker([marked], [], [])
}

test_absence_before_the_baseline_that_was_replaced_does_not_count if {
	value(worker([marked], [], [away("2020-03-05", 7)])) == 0
	value(worker([marked], [], [away("2020-03-06", 7)])) == 7
	second := {"date": "2025-03-05", "ref": "audiogram/a4"}
	set_twice := worker([marked, second], [], [away("2023-09-01", 7)])
	{[o.key, o.value] | some o in baseline_kept.obligations} == {["2024-03-05", 7], ["2025-03-05", 0]} with input as set_twice
}
