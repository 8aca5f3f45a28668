# METADATA
# title: Guidance and training in the use of protectors
# description: >-
#   The organization guides and trains workers in the proper use, keeping and care of the protectors supplied. The
#   text sets no refresher.
# custom:
#   cite: NR-6 6.5.1 b (secondary source)
#   subject: worker
#   topic: training
#   severity: major
#   evidence: [training, protector_issue]
#   remedy: >-
#     Train the worker in the use of the protector handed over, and record the topic.
package duty.ppe_training

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"on": input.protector_training.date,
	"because": common.refs([input.protector_training, input.protection]),
} if {
	input.protection != null
	input.protector_training != null
}

obligations contains {
	"holds": null,
	"note": "the training on record does not say what it was about",
	"missing": ["the topics of the training"],
	"because": common.refs([input.training, input.protection]),
} if {
	untrained
	topics_blank
}

obligations contains {
	"holds": false,
	"note": "the worker has protectors and no training in their use is on record",
	"because": common.refs([input.protection]),
} if {
	untrained
	not topics_blank
}

not_owed contains "no protector is at hand" if input.protection == null

untrained if {
	input.protection != null
	input.protector_training == null
}

topics_blank if {
	input.training != null
	input.training.topics_unrecorded == true
}
