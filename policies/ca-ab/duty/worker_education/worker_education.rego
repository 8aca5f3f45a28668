# METADATA
# title: Education of workers
# description: >-
#   Workers exposed to excess noise are educated in the hazards of noise and trained in the measures of control and in
#   protectors. From the regulator's bulletin, in part from memory; no interval is known.
# custom:
#   cite: OHS Code, s. 221
#   subject: worker
#   topic: training
#   severity: major
#   evidence: [training]
#   remedy: Educate the worker in what is lacking, and record the topics.
package duty.worker_education

import data.common
import rego.v2

obligations contains {
	"key": topic,
	"holds": covered(topic),
	"note": note(topic),
	"missing": common.missing(covered(topic), "the topics of the training"),
	"because": common.refs([input.training]),
} if {
	owed
	some topic in common.at(data.parameters.education_topics, input.as_of)
}

not_owed contains "the worker is not known to be exposed to excess noise now" if not owed

owed if common.any_current(input.enrolled)

covered(_) := false if input.training == null

covered(topic) if topic in input.training.topics

covered(topic) := null if {
	input.training.topics_unrecorded
	not topic in input.training.topics
}

covered(topic) := false if {
	input.training.topics_unrecorded == false
	not topic in input.training.topics
}

note(topic) := sprintf("no training on record covers %s", [replace(topic, "_", " ")]) if {
	covered(topic) == false
} else := null
