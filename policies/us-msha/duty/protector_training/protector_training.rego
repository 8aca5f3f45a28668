# METADATA
# title: Training in the use of protectors
# description: >-
#   The operator trains the miner to whom a hearing protector is provided, under 62.180, which includes its care,
#   fitting and use.
# custom:
#   cite: 30 CFR 62.160(a)(1)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [training, protector_issue]
#   remedy: Train the miner in care, fitting and use of the protectors handed over, and record the topic.
package duty.protector_training

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"on": input.protector_training.date,
	"because": common.refs([input.protector_training, input.protection]),
} if {
	has_protector
	input.protector_training != null
}

obligations contains {
	"holds": null,
	"note": "the training on record does not say what it was about",
	"missing": ["the topics of the training"],
	"because": common.refs([input.training, input.protection]),
} if {
	has_protector
	input.protector_training == null
	topics_blank
}

obligations contains {
	"holds": false,
	"note": "the miner has protectors and no training in their use is on record",
	"because": common.refs([input.protection]),
} if {
	has_protector
	input.protector_training == null
	not topics_blank
}

not_owed contains "the records do not show exposure at or above the action level now" if not in_program_now

not_owed contains "no protector at hand, which is a finding of its own" if {
	in_program_now
	not has_protector
}

in_program_now if common.any_current(input.enrolled)

has_protector if {
	in_program_now
	input.protection != null
}

topics_blank if {
	input.training != null
	input.training.topics_unrecorded == true
}
