# METADATA
# title: Adequate attenuation
# description: >-
#   The attenuation of protectors is evaluated for the noise in which they are worn, by a method of Appendix B. Under the
#   protector the 8-hour average is 90 dBA or less where paragraph (b) requires protectors, and 85 dBA or less for an
#   employee who has had a standard threshold shift. Half the attenuation, deratings, fit tests, two protectors worn
#   together and a part of the time without them are shown for information and decide nothing.
# custom:
#   cite: 29 CFR 1910.95(j)(1)-(3), Appendix B
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [protector_issue, protector, measurement, fit_test]
#   remedy: Give the worker a protector with more attenuation, or lower the exposure, and evaluate again.
package duty.attenuation_adequate

import data.common
import rego.v2

obligations contains object.union(estimate, {"at_most": "attenuation_target_after_shift"}) if {
	has_protector
	after_shift
}

obligations contains object.union(estimate, {"at_most": "attenuation_target"}) if {
	has_protector
	not after_shift
	above_limit_or_not_known
}

not_owed contains "the records do not show exposure at or above the action level now" if not in_program_now

not_owed contains "no protector at hand, which is a finding of its own" if {
	in_program_now
	not has_protector
}

not_owed contains "neither above the permissible exposure nor after a threshold shift" if {
	has_protector
	not after_shift
	not above_limit_or_not_known
}

estimate := {
	"value": input.protection.under_db,
	"note": said,
	"missing": [word | some word in input.protection.missing; input.protection.under_db == null],
	"because": records,
	"facts": {
		"protector": input.protection.protector,
		"exposure_dba": input.protection.exposure_dba,
		"notes_on_exposure": [exposure.note | some exposure in exposures_now; exposure.note != null],
		"method": input.protection.method,
		"working": input.protection.working,
		"with_half_the_attenuation_dba": input.protection.halved_db,
		"personal_attenuation_rating_db": input.protection.par_db,
		"for_information": [in_words(other) | some other in input.protection.information],
	},
}

# An estimate by another method, which decides nothing, with how its formula was seen.
in_words(other) := sprintf("%s: %s", [other.method, other.working]) if {
	other.mark == null
} else := sprintf("%s: %s (%s)", [other.method, other.working, other.mark])

said := "the level under the protector cannot be estimated" if {
	input.protection.under_db == null
} else := "estimated level under the protector"

# The protector handed over, its model with the rating, and what the exposure of today rests on.
records := array.concat(
	[input.protection.ref, sprintf("protector/%s", [input.protection.protector])],
	common.refs(exposures_now),
)

exposures_now := [exposure | some exposure in input.exposures; common.covers(exposure, input.as_of)]

in_program_now if common.any_current(input.enrolled)

has_protector if {
	in_program_now
	input.protection != null
}

after_shift if common.any_current(input.after_shift)

above_limit_or_not_known if common.any_current(input.exposed.limit)

above_limit_or_not_known if {
	some stretch in input.exposure_unknown.limit
	common.covers(stretch, input.as_of)
}
