# METADATA
# title: Nobody in a noise area without protectors
# description: >-
#   Workers stay in a noise area only if the work requires it and they use suitable personal protective equipment.
# custom:
#   cite: LärmVibrationsArbSchV § 7(4) sentence 2
#   subject: area
#   topic: protectors
#   severity: major
#   evidence: [wear_check, measurement]
#   remedy: Make sure that all in the area wear protectors, and record a check.
package duty.zone_protection

import data.common
import rego.v2

obligations contains {
	"key": "now",
	"holds": all_wear,
	"note": said,
	"missing": [words | all_wear == null; words := "a look at how many in the area wear protectors"],
	"because": common.refs([look | some look in [latest]]),
	"facts": {"workers": input.workers},
} if {
	upper_exceeded_now
}

not_owed contains "the records do not show exposure above the upper action values now" if not upper_exceeded_now

upper_exceeded_now if common.any_current(input.exposed.upper_exceeded)

# Looks come oldest first; one without numbers says nothing.
looks := [look |
	some look in input.wear_checks
	look.observed != null
	look.wearing != null
	look.observed > 0
]

latest := null if {
	count(looks) == 0
} else := looks[count(looks) - 1]

all_wear := null if {
	latest == null
} else := latest.wearing >= latest.observed

said := sprintf("of %d in the noise area %d wore protectors", [latest.observed, latest.wearing]) if {
	all_wear == false
} else := null
