# METADATA
# title: Protectors worn (recommended)
# description: >-
#   Protectors are worn whenever work is done at 85 dBA or more, for however short a time; an 8-hour average below the
#   REL is no licence to go without. The records know exposure as an average of the day, so this is asked of workers at
#   or above the REL.
# custom:
#   cite: NIOSH 98-126, 1.5
#   subject: worker
#   topic: protectors
#   severity: minor
#   evidence: [wear_check, protector_issue, measurement]
#   remedy: >-
#     See to it that the worker wears protectors, and record a check of it.
package duty.protectors_worn

import data.common
import rego.v2

obligations contains {
	"holds": input.wear.worn,
	"on": input.wear.date,
	"note": said[input.wear.worn],
	"missing": common.missing(input.wear.worn, "the outcome of the check"),
	"because": [input.wear.ref],
	"facts": {"worker_looked_at": input.wear.own},
} if {
	checked
}

obligations contains {
	"holds": null,
	"note": "nobody has checked whether the worker wears protectors since exposure reached the REL",
	"missing": ["a check of whether protectors are worn"],
} if {
	count(now) > 0
	not checked
}

not_owed contains "the records do not show exposure at or above the REL now" if count(now) == 0

now := [stretch | some stretch in input.enrolled; stretch.current]

checked if {
	some stretch in now
	input.wear != null
	input.wear.date >= stretch.from
}

said := {
	true: null,
	false: "the worker was seen without protectors",
	null: "the check does not say whether the worker wore protectors",
}
