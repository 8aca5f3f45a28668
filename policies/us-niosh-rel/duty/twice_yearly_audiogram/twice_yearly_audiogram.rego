# METADATA
# title: Audiogram twice a year (recommended)
# description: >-
#   Good practice, by a footnote of the guide NIOSH 96-110: whoever is exposed above a time-weighted average of 100 dBA
#   has a hearing test twice a year. Read as every six months, from the baseline or from the first day above 100 dBA,
#   whichever is later.
# custom:
#   cite: NIOSH 96-110, footnote 1
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [audiogram, measurement]
#   remedy: >-
#     Test the worker now, and plan two tests a year as long as exposure is that high.
package duty.twice_yearly_audiogram

import data.common
import rego.v2

obligations contains {"every": "half_year_interval", "during": overlap(stretch, spell), "by": "audiogram.valid"} if {
	some stretch in tested
	some spell in input.exposed.twice
	meet(stretch, spell)
}

obligations contains {
	"holds": null,
	"note": sprintf("it is not known whether exposure is so high that two tests a year are good practice: %s", [concat("; ", not_known)]),
	"missing": ["an exposure that can be held against the level for two tests a year"],
} if {
	count(not_known) > 0
}

not_owed contains "exposure is never known to be above the level for two tests a year after the baseline" if {
	count(not_known) == 0
	count(meetings) == 0
}

tested := [stretch.tested | some stretch in input.enrolled; stretch.tested != null]

meetings := [spell.from | some stretch in tested; some spell in input.exposed.twice; meet(stretch, spell)]

# Of a worker who is not known to be in the program, enrolment tells.
not_known := [open.reason |
	common.any_current(tested)
	some open in input.exposure_unknown.twice
	common.covers(open, input.as_of)
]

meet(a, b) if {
	begins_before_the_end(a, b)
	begins_before_the_end(b, a)
}

begins_before_the_end(_, b) if b.to == null

begins_before_the_end(a, b) if {
	b.to != null
	a.from < b.to
}

overlap(a, b) := {"from": max([a.from, b.from]), "to": first_end([to | some to in [a.to, b.to]; to != null])}

first_end(ends) := min(ends) if {
	count(ends) > 0
} else := null
