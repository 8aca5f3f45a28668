# METADATA
# title: Contents of the training
# description: >-
#   The information, instruction and training include nine heads: the nature of the risk; the measures taken; the
#   limit and action values; the findings of the risk assessment with an explanation; protectors and their correct
#   use; why and how to detect and report signs of hearing damage; the entitlement to health surveillance and its
#   purpose; safe working practices; and the collective results of health surveillance, in a form that names nobody,
#   of which there may be none below the upper exposure action values.
#   Sessions of three years add up, since the text sets no round.
# custom:
#   cite: Control of Noise at Work Regulations reg 10(2)
#   subject: worker
#   topic: training
#   severity: major
#   evidence: [training]
#   remedy: Train the worker on the heads that are missing, or enter the topics of the sessions that were held.
package duty.training_content

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"on": input.training.date,
	"facts": {"topics": input.training.topics},
	"because": [input.training.ref],
}) if {
	exposed
	input.training != null
}

verdict := {
	"holds": null,
	"missing": ["topics of the training"],
	"note": sprintf("the latest training, of %s, does not say what it was about", [input.training.date]),
} if {
	input.training.topics_unrecorded
} else := {
	"holds": null,
	"missing": ["the heads that the law asks for on that day"],
	"note": "no list of heads is in force on the day of the training",
} if {
	required == null
} else := {
	"holds": null,
	"missing": ["whether there are collective results of health surveillance"],
	"note": sprintf("the training up to %s left out collective results, and it is not known whether there are any for workers below the upper exposure action values", [input.training.date]),
} if {
	left_out == ["collective_results"]
	not at_upper
} else := {
	"holds": false,
	"note": sprintf("the training up to %s left out: %s", [input.training.date, common.in_words(left_out)]),
} if {
	count(left_out) > 0
} else := {
	"holds": true,
	"note": sprintf("the training up to %s covered every head", [input.training.date]),
}

required := common.at(data.parameters.training_heads, input.training.date)

left_out := [head | some head in required; not head in input.training.topics]

exposed if common.any_current(input.exposed.lower)

# Where health surveillance is owed, and so there are results of it.
at_upper if common.any_current(input.exposed.upper)

not_owed contains "exposure is not known to be at or above a lower exposure action value" if not exposed

not_owed contains "there is no training, which is a finding of its own" if {
	exposed
	input.training == null
}
