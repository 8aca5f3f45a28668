# METADATA
# title: Contents of the training
# description: >-
#   The instruction covers the effects of noise on hearing; purpose and value of hearing protectors; advantages and
#   disadvantages of those offered; the types offered, their care, fitting and use; the general requirements of Part 62;
#   the tasks of operator and miner in keeping up noise controls; and purpose and value of audiometric testing with a
#   summary of its procedures. The sessions of a yearly round add up.
# custom:
#   cite: 30 CFR 62.180(a)(1)-(7)
#   subject: worker
#   topic: training
#   severity: major
#   evidence: [training]
#   remedy: Train the miner on the topics that are missing, or enter the topics of the sessions that were held.
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
} else := {
	"holds": null,
	"missing": ["the topics that the law asks for on that day"],
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

not_owed contains "the miner is not in the program now" if not in_program

not_owed contains "there is no training yet" if input.training == null
