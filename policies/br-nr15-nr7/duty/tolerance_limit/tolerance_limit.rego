# METADATA
# title: Tolerance limit of continuous noise
# description: >-
#   The exposure to continuous or intermittent noise does not exceed the tolerance limit (limite de tolerância):
#   where several levels occur on a day, the sum C1/T1 + C2/T2 + ... of the times spent and the times permitted by
#   the table of Annex 1 is not above unity. Measured A-weighted, slow, near the worker's ear, without regard to
#   protectors.
# custom:
#   cite: NR-15 Annex 1 items 2 to 6
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [measurement, task, group]
#   remedy: >-
#     Bring the level or the time of exposure down until the sum of C/T is at most 1, collective measures first;
#     then measure again.
package duty.tolerance_limit

import data.common
import rego.v2

obligations contains {
	"holds": false,
	"on": above.from,
	"note": "the sum of C/T of the day is above 1",
	"because": decided_by,
	"facts": facts,
} if {
	some above in current
}

obligations contains {
	"holds": null,
	"note": sprintf("it is not known whether the tolerance limit is exceeded: %s", [concat("; ", reasons)]),
	"missing": ["a dose that can be held against the tolerance limit"],
	"because": decided_by,
	"facts": facts,
} if {
	count(current) == 0
	input.first_survey != null
	count(reasons) > 0
}

obligations contains {
	"holds": true,
	"note": "the sum of C/T of the day is not above 1",
	"because": decided_by,
	"facts": facts,
} if {
	count(current) == 0
	input.first_survey != null
	count(reasons) == 0
}

not_owed contains "no result gives the group's dose, which is a finding of its own where noise is suspected" if {
	count(current) == 0
	input.first_survey == null
}

current := [stretch | some stretch in input.exposed.limit; stretch.current]

reasons := common.reasons(input.exposure_unknown.limit, input.as_of)

decided_by := [input.now.ref |
	input.now != null
	input.now.ref != null
]

default facts := {}

facts := {
	"dose_pct": input.now.channels.limit.dose_pct,
	"at_least_pct": input.now.channels.limit.at_least,
	"at_most_pct": input.now.channels.limit.at_most,
	"workers": input.workers,
	"working": input.now.channels.limit.working,
} if {
	input.now != null
}
