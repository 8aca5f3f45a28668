# METADATA
# title: Baseline kept
# description: >-
#   A change of enrolment status is no reason for a new baseline or revised baseline. The operator may establish a new
#   one only if the miner is away from the mine for more than 6 consecutive months; the decision is recorded as a
#   baseline revision with the result new_baseline. The absence lies between the baseline that stood and the new one.
# custom:
#   cite: 30 CFR 62.170(a)(3)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram, follow_up, worker]
#   remedy: Go on comparing with the old baseline, or record the absence that allowed a new one.
package duty.baseline_kept

import rego.v2

obligations contains {
	"key": set_anew.date,
	"value": longest_absence(set_anew.date),
	"above": "absence_for_new_baseline",
	"on": set_anew.date,
	"note": "a new baseline was set, and this is how long the miner had been away from the mine",
	"because": [set_anew.ref],
} if {
	some set_anew in new_baselines
}

not_owed contains "no new baseline was set" if count(new_baselines) == 0

new_baselines := {{"date": marked.date, "ref": marked.ref} | some marked in input.marked_later} | {{"date": revision.date, "ref": revision.ref} |
	some revision in input.revisions
	revision.result == "new_baseline"
}

# An absence before the baseline that was replaced is no reason to replace it.
longest_absence(day) := max(array.concat([0], [absence.months |
	some absence in input.absences
	absence.to <= day
	every earlier in established { not between(earlier, absence.to, day) }
]))

# Days on which a baseline was established: the first one, and those that were set anew.
established := {set_anew.date | some set_anew in new_baselines} | {input.baseline.date | input.baseline != null}

between(earlier, back, day) if {
	earlier >= back
	earlier < day
}
