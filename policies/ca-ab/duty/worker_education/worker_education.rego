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

obligations contains {"key": "training", "holds": false, "note": "no training of the worker is on record"} if {
	owed
	input.training == null
}

obligations contains {
	"key": "topics",
	"holds": null,
	"note": sprintf("it is not recorded what the training up to %s was about", [input.training.date]),
	"missing": ["the topics of the training"],
	"because": common.refs([input.training]),
} if {
	owed
	input.training.topics_unrecorded
	count(not_covered) > 0
}

obligations contains {
	"key": topic,
	"holds": topic in input.training.topics,
	"note": note(topic),
	"because": common.refs([input.training]),
} if {
	owed
	input.training != null
	some topic in common.at(data.parameters.education_topics, input.as_of)
	not silent(topic)
}

not_owed contains "the worker is not known to be exposed to excess noise now" if not owed

owed if common.any_current(input.enrolled)

# Topics of which a session without topics on record may have told.
silent(topic) if {
	input.training.topics_unrecorded
	not topic in input.training.topics
}

not_covered := [topic |
	some topic in common.at(data.parameters.education_topics, input.as_of)
	not topic in input.training.topics
]

note(topic) := sprintf("no training on record covers %s", [replace(topic, "_", " ")]) if {
	not topic in input.training.topics
} else := null
