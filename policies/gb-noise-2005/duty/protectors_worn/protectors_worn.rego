# METADATA
# title: Protectors fully and properly used
# description: >-
#   So far as is practicable the employer ensures that anything provided under the Regulations is fully and properly
#   used. Protectors available on request under regulation 7(1) are exempt; what is asked here is of those at or
#   above an upper exposure action value.
# custom:
#   cite: Control of Noise at Work Regulations reg 8(1)(a)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [wear_check, protector_issue, measurement]
#   remedy: See to it that the worker wears protectors, and record a check of it.
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
	owed
	checked
}

obligations contains {
	"holds": null,
	"note": "nobody has checked whether the worker wears protectors since exposure has been at or above an upper exposure action value",
	"missing": ["a check of whether protectors are worn"],
} if {
	owed
	not checked
}

not_owed contains "exposure is not known to be at or above an upper exposure action value" if not at_upper

not_owed contains "no protector at hand, which is a finding of its own" if {
	at_upper
	input.protection == null
}

owed if {
	at_upper
	input.protection != null
}

at_upper if common.any_current(input.exposed.upper)

checked if {
	input.wear != null
	input.wear.date >= common.current_since(input.exposed.upper)
}

said := {
	true: "the worker was seen with protectors",
	false: "the worker was seen without protectors",
	null: "the check does not say whether the worker wore protectors",
}
