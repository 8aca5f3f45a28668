# METADATA
# title: Protectors worn
# description: >-
#   The employer ensures that protectors are worn by every employee exposed above Table G-16, by every employee at or above
#   the action level who has had a standard threshold shift, and, where a mobile test van is used, by every employee who has
#   no baseline audiogram yet when six months are over, until it is obtained.
# custom:
#   cite: 29 CFR 1910.95(i)(2)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [wear_check, protector_issue, audiogram, measurement]
#   remedy: See to it that the worker wears protectors, and record a check of it.
package duty.protectors_worn

import data.common
import rego.v2

# Above the limit, or after a shift: a check since the wear became compulsory says whether they are worn.

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
	"note": "nobody has checked whether the worker wears protectors since this became compulsory",
	"missing": ["a check of whether protectors are worn"],
	"facts": {"compulsory": reasons, "compulsory_since": compulsory_since},
} if {
	compulsory
	not checked
}

obligations contains {
	"key": "now",
	"holds": null,
	"note": sprintf("it is not known whether exposure is above the permissible exposure, so that wear is compulsory: %s", [concat("; ", limit_not_known)]),
	"missing": ["an exposure that can be held against the permissible exposure"],
} if {
	not compulsory
	count(limit_not_known) > 0
}

# Mobile test van: what comes first by the end of month six, a baseline or protectors.

obligations contains {
	"key": sprintf("van/%s", [spell.from]),
	"after": spell.from,
	"within": "baseline_time",
	"by": ["audiogram.baseline", "protector.worn", "protector.issue"],
	"during": spell,
} if {
	some spell in spells_with_van
}

not_owed contains "protectors are not compulsory for this worker" if {
	not compulsory
	count(limit_not_known) == 0
	count(spells_with_van) == 0
}

compulsory if count(compulsory_spells) > 0

compulsory_spells := [spell | some spell in array.concat(above_limit, after_shift)]

above_limit := [spell | some spell in input.exposed.limit; spell.current == true]

after_shift := [spell | some spell in input.after_shift; spell.current == true]

reasons := array.concat(
	["exposure above the limit" | count(above_limit) > 0],
	["a threshold shift" | count(after_shift) > 0],
)

compulsory_since := min([spell.from | some spell in compulsory_spells])

checked if {
	input.wear != null
	input.wear.date >= compulsory_since
}

# Of a worker who is not known to be in the program, enrolment tells; the other duties stay silent.
limit_not_known := [stretch.reason |
	in_program
	some stretch in input.exposure_unknown.limit
	common.covers(stretch, input.as_of)
]

in_program if common.any_current(input.enrolled)

spells_with_van := [spell | some spell in input.enrolled; with_van(spell)]

with_van(spell) if spell.baseline_mobile == true

with_van(spell) if {
	spell.baseline == null
	input.choices.mobile_test_van == true
}

said := {
	true: null,
	false: "the worker was seen without protectors",
	null: "the check does not say whether the worker wore protectors",
}
