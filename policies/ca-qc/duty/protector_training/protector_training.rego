# METADATA
# title: Training of protector users
# description: >-
#   Whoever uses protectors is trained in theory and practice: choice, fitting, inspection and use of the protectors,
#   and the risks of noise. Content partly from a secondary source, section numbers from memory; no interval is known.
# custom:
#   cite: r. 13, ss. 139 and 140
#   subject: worker
#   topic: training
#   severity: minor
#   evidence: [training, protector_issue]
#   remedy: Train the worker in the protector and in the risks of noise, and record the topics.
package duty.protector_training

import data.common
import rego.v2

obligations contains {
	"key": "any",
	"holds": false,
	"note": "no training is on record",
	"because": common.refs([input.protection]),
} if {
	user
	input.training == null
}

obligations contains {
	"key": topic,
	"holds": covered(topic),
	"note": note(topic),
	"missing": common.missing(covered(topic), "the topics of the training"),
	"because": common.refs([input.protection, input.training]),
} if {
	user
	input.training != null
	some topic in common.at(data.parameters.training_topics, input.as_of)
}

not_owed contains "the worker is not known to use protectors above a limit now" if not user

user if {
	input.protection != null
	common.at(data.parameters.training_topics, input.as_of) != null
	common.any_current(input.exposed.limit)
}

covered(topic) if topic in input.training.topics

covered("protectors") if {
	input.protector_training != null
	not "protectors" in input.training.topics
}

covered(topic) := null if {
	input.training.topics_unrecorded
	not topic in input.training.topics
	not kept_from_before(topic)
}

covered(topic) := false if {
	input.training.topics_unrecorded == false
	not topic in input.training.topics
	not kept_from_before(topic)
}

kept_from_before("protectors") if input.protector_training != null

note(topic) := sprintf("no training on record covers %s", [replace(topic, "_", " ")]) if {
	covered(topic) == false
} else := null
