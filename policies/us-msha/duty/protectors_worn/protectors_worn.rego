# METADATA
# title: Protectors worn
# description: >-
#   The operator ensures that protectors are worn by every miner above the permissible exposure level, before controls are
#   in place or in spite of all feasible ones, and by every miner at or above the action level who has had a standard
#   threshold shift, or for whom more than 6 months pass before a baseline can be determined. For all others at or above
#   the action level wearing them is voluntary. A miner who declined the test is not waiting for one.
# custom:
#   cite: 30 CFR 62.160(b)-(c)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [wear_check, audiogram, measurement]
#   remedy: See to it that the miner wears protectors, and record a check of it.
package duty.protectors_worn

import data.common
import rego.v2

# Above the permissible exposure level, or after a shift: a check since wear became compulsory says whether they are worn.

obligations contains {
	"key": "now",
	"holds": input.wear.worn,
	"on": input.wear.date,
	"note": said[input.wear.worn],
	"missing": common.missing(input.wear.worn, "the outcome of the check"),
	"because": [input.wear.ref],
	"facts": {"compulsory": reasons, "compulsory_since": compulsory_since, "worker_looked_at": input.wear.own},
} if {
	compulsory
	checked
}

obligations contains {
	"key": "now",
	"holds": null,
	"note": "nobody has checked whether the miner wears protectors since this became compulsory",
	"missing": ["a check of whether protectors are worn"],
	"facts": {"compulsory": reasons, "compulsory_since": compulsory_since},
} if {
	compulsory
	not checked
}

obligations contains {
	"key": "now",
	"holds": null,
	"note": sprintf("it is not known whether exposure is above the permissible exposure level, so that wear is compulsory: %s", [concat("; ", limit_not_known)]),
	"missing": ["an exposure that can be held against the permissible exposure level"],
} if {
	not compulsory
	count(limit_not_known) > 0
}

# No baseline yet: what comes first by the end of month six, a baseline or protectors that are worn.

obligations contains {
	"key": sprintf("no baseline/%s", [spell.from]),
	"after": spell.from,
	"within": "baseline_time",
	"by": ["audiogram.baseline", "protector.worn"],
	"during": {"from": spell.from, "to": spell.to},
	"note": "protectors are to be worn from month six on until there is a baseline",
} if {
	some spell in waiting
}

not_owed contains "protectors are not compulsory for this miner" if {
	not compulsory
	count(limit_not_known) == 0
	count(waiting) == 0
}

compulsory if count(compulsory_days) > 0

compulsory_days := array.concat([spell.from | some spell in above_limit], [shift.date | some shift in shifts])

above_limit := [spell | some spell in input.exposed.limit; spell.current == true]

shifts := [shift | some shift in input.shifts; in_program; not shift.ref in set_anew]

# A test that became the new baseline after a long absence is compared with no other.
set_anew := {revision.audiogram | some revision in input.revisions; revision.result == "new_baseline"}

reasons := array.concat(
	["exposure above the permissible exposure level" | count(above_limit) > 0],
	["a standard threshold shift" | count(shifts) > 0],
)

compulsory_since := min(compulsory_days)

checked if {
	input.wear != null
	input.wear.date >= compulsory_since
}

# Of a miner who is not known to be in the program, enrolment tells.
limit_not_known := [stretch.reason |
	in_program
	some stretch in input.exposure_unknown.limit
	common.covers(stretch, input.as_of)
]

in_program if common.any_current(input.enrolled)

waiting := [spell | some spell in input.enrolled; waits(spell); not declined(spell); not compulsory_throughout(spell)]

# Above the permissible exposure level since it began: that wear is compulsory is said already.
compulsory_throughout(spell) if {
	spell.current == true
	some loud in above_limit
	loud.from <= spell.from
}

waits(spell) if spell.baseline == null

waits(spell) if spell.baseline_mobile == true

declined(spell) if {
	some offer in input.examinations
	offer.kind == "hearing_test"
	offer.answer == "declined"
	common.covers(spell, offer.offered_on)
}

said := {
	true: null,
	false: "the miner was seen without protectors",
	null: "the check does not say whether the miner wore protectors",
}
