# METADATA
# title: Topics of the instruction
# description: >-
#   The instruction, in a form and language that workers understand, holds eight heads: the kind of risk, the
#   measures, the values, the results with what they mean, the use of protectors, when workers are entitled to
#   occupational health care and why, safe working methods, and how to notice and report damage.
# custom:
#   cite: LärmVibrationsArbSchV § 11(2)
#   subject: worker
#   topic: training
#   severity: minor
#   evidence: [training]
#   remedy: Cover the topics that lack, and record them.
package duty.information_content

import data.common
import rego.v2

obligations contains {
	"holds": covered,
	"note": said,
	"missing": [words | hidden; words := "the topics of the training"],
	"because": common.refs([input.training]),
	"facts": {"topics_asked_for": topics, "topics_not_covered": lacking},
} if {
	exposed_now
	input.training != null
}

not_owed contains "the records do not show exposure at or above the lower action values now" if not exposed_now

not_owed contains "no training is on record, which is a finding of its own" if {
	exposed_now
	input.training == null
}

exposed_now if common.any_current(input.exposed.lower_reached)

topics := common.at(data.parameters.instruction_topics, input.as_of)

lacking := sort({topic | some topic in topics} - {topic | some topic in input.training.topics})

hidden if topics == null

hidden if input.training.topics_unrecorded == true

covered := null if {
	hidden
} else := count(lacking) == 0

said := "the training on record does not say what it covered" if {
	hidden
} else := sprintf("the training did not cover: %s", [common.in_words(lacking)]) if {
	count(lacking) > 0
} else := null
