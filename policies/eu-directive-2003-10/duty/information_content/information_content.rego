# METADATA
# title: Topics of information and training
# description: >-
#   Information and training cover eight heads: the nature of the risks, the measures taken, the limit and action
#   values, the results with what they mean, the correct use of protectors, how to detect and report damage, when
#   health surveillance is due and why, and safe practices.
# custom:
#   cite: Directive 2003/10/EC Art 8(a)-(h)
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

topics := common.at(data.parameters.information_topics, input.as_of)

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
