# METADATA
# title: Use of protectors required
# description: >-
#   The organization requires the use of the protectors. Above the tolerance limit a check since the limit was
#   exceeded shows whether they are worn.
# custom:
#   cite: NR-6 6.5.1 b (secondary source)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [wear_check, measurement]
#   remedy: >-
#     See to it that the worker wears the protector, and record a check of it.
package duty.ppe_use

import data.common
import rego.v2

obligations contains {
	"holds": input.wear.worn,
	"on": input.wear.date,
	"note": said[input.wear.worn],
	"missing": common.missing(input.wear.worn, "the outcome of the check"),
	"because": [input.wear.ref],
	"facts": {"above_the_limit_since": above_since, "worker_looked_at": input.wear.own},
} if {
	checked
}

obligations contains {
	"holds": null,
	"note": "nobody has checked whether the worker wears a protector since the tolerance limit is exceeded",
	"missing": ["a check of whether protectors are worn"],
	"facts": {"above_the_limit_since": above_since},
} if {
	above_limit
	not checked
	input.protection != null
}

not_owed contains "no protector is on record as supplied, which is a finding of its own" if {
	above_limit
	not checked
	input.protection == null
}

not_owed contains "the worker is not known to be above the tolerance limit" if not above_limit

above_since := common.current_since(input.exposed.limit)

checked if {
	above_limit
	input.wear != null
	input.wear.date >= above_since
}

said := {
	true: "the worker was seen with a protector",
	false: "the worker was seen without a protector",
	null: "the check does not say whether the worker wore a protector",
}

above_limit if above_since != null
