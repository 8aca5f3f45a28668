# METADATA
# title: Contents of the training (recommended)
# description: >-
#   The yearly training tells of the effects of noise on hearing, of protectors, of audiometric testing, of the roles
#   and duties of employer and worker in the program, and of noise outside work. The sessions of a yearly round add up.
# custom:
#   cite: NIOSH 98-126, 1.8 (from memory)
#   subject: worker
#   topic: training
#   severity: minor
#   evidence: [training]
#   remedy: >-
#     Train the worker on the topics that are missing, or enter the topics of the sessions that were held.
package duty.training_content

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"on": input.training.date,
	"facts": {"topics": input.training.topics},
	"because": [input.training.ref],
}) if {
	in_program
	input.training != null
}

verdict := {
	"holds": null,
	"missing": ["topics of the training"],
	"note": sprintf("the latest training, of %s, does not say what it was about", [input.training.date]),
} if {
	input.training.topics_unrecorded
	count(left_out) > 0
} else := {
	"holds": null,
	"missing": ["the topics that are recommended on that day"],
	"note": "no list of topics is in force on the day of the training",
} if {
	required == null
} else := {
	"holds": false,
	"note": sprintf("the training of %s left out: %s", [input.training.date, common.in_words(left_out)]),
} if {
	count(left_out) > 0
} else := {
	"holds": true,
	"note": sprintf("the training of %s covered every topic", [input.training.date]),
}

required := common.at(data.parameters.training_topics, input.training.date)

left_out := [topic | some topic in required; not topic in input.training.topics]

in_program if common.any_current(input.enrolled)

not_owed contains "the worker is not in the program now" if not in_program

not_owed contains "there is no training yet" if input.training == null
