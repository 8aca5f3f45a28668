# METADATA
# title: Residual level under the protector (guidance)
# description: >-
#   The level under the protector lies between 70 and 80 dB(A). Above 80 dB(A) it is allowed up to the highest value,
#   but not recommended; below 70 dB(A) the protector may shut out too much.
# custom:
#   cite: DGUV Information 212-024 Annex 2
#   subject: worker
#   topic: protectors
#   severity: minor
#   evidence: [measurement, protector_issue, protector]
#   remedy: Choose a protector that fits the noise, and ask whether the worker hears speech and signals.
package duty.residual_level

import data.common
import rego.v2

obligations contains object.union(estimate, {"key": "not too loud", "at_most": "residual_top"}) if protected_now

# A level that is not known is said once.
obligations contains object.union(estimate, {"key": "not too quiet", "at_least": "residual_floor"}) if {
	protected_now
	input.protection.under_db != null
}

not_owed contains "the records do not show exposure above the lower action values now" if not above_now

not_owed contains "no protector at hand, which is a finding of its own" if {
	above_now
	input.protection == null
}

estimate := {
	"value": input.protection.under_db,
	"note": "estimated at the ear, under the protector",
	"missing": [words | some words in input.protection.missing; input.protection.under_db == null],
	"because": common.refs([input.protection]),
	"facts": {"protector": input.protection.protector, "estimate": input.protection.working},
}

protected_now if {
	above_now
	input.protection != null
}

above_now if common.any_current(input.exposed.lower_exceeded)
