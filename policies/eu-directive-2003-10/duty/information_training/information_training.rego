# METADATA
# title: Information and training
# description: >-
#   Workers who are exposed at or above the lower action values, and their representatives, receive information and
#   training on the risks of noise. The Directive names no interval.
# custom:
#   cite: Directive 2003/10/EC Art 8
#   subject: worker
#   topic: training
#   severity: major
#   evidence: [training, measurement]
#   remedy: Inform and train the worker, and record the day and the topics.
package duty.information_training

import data.common
import rego.v2

obligations contains {
	"key": "now",
	"holds": input.training != null,
	"note": said,
	"because": common.refs([input.training]),
	"facts": {"exposed_since": common.current_since(input.exposed.lower_reached)},
} if {
	exposed_now
}

not_owed contains "the records do not show exposure at or above the lower action values now" if not exposed_now

exposed_now if common.any_current(input.exposed.lower_reached)

said := "no information or training on noise is on record" if {
	input.training == null
} else := null
