# METADATA
# title: Protectors for workers with hearing loss (guidance)
# description: >-
#   For workers whose hearing is damaged, with a loss of 40 dB at 3000 Hz, protectors are necessary from 80 dB(A) on.
#   The records hold thresholds by air conduction; whether the inner ear is damaged, a physician judges.
# custom:
#   cite: DGUV FAQ on TRLV Lärm 3
#   subject: worker
#   topic: protectors
#   severity: minor
#   evidence: [wear_check, audiogram, measurement]
#   remedy: Make sure that the worker wears protectors, and record a check of it.
package duty.hearing_loss_protectors

import data.common
import rego.v2

obligations contains {
	"key": "now",
	"holds": worn,
	"note": said,
	"missing": [words | worn == null; words := "a check since the exposure began that says whether the worker wears protectors"],
	"because": array.concat([latest.ref], common.refs([check | some check in [input.wear]; counts])),
	"facts": {"exposed_since": since},
} if {
	since != null
	not compulsory_for_all
	damaged
}

not_owed contains "the records do not show exposure at or above the lower action values now" if since == null

not_owed contains "no hearing test on record shows a loss for which protectors are asked for below the upper values" if {
	since != null
	not compulsory_for_all
	not damaged
}

not_owed contains "at or above the upper action values all wear protectors, which is a duty of its own" if {
	since != null
	compulsory_for_all
}

compulsory_for_all if common.any_current(input.exposed.upper_reached)

since := common.current_since(input.exposed.lower_reached)

tests := [test | some test in input.audiograms; test.invalidated == false]

# Tests come oldest first.
latest := tests[count(tests) - 1]

damaged if latest.schemes.hearing_damage.left == true

damaged if latest.schemes.hearing_damage.right == true

counts if {
	input.wear != null
	input.wear.date >= since
}

worn := input.wear.worn if {
	counts
} else := null

said := "the worker, whose hearing is damaged, was seen without protectors" if {
	worn == false
} else := "the worker's hearing is damaged, and no check shows that protectors are worn" if {
	worn == null
} else := null
