# METADATA
# title: Individual fit test, since January 2025 (recommended)
# description: >-
#   Since its update of January 2025 NIOSH recommends an individual, quantitative fit test of every wearer of hearing
#   protectors, which gives a personal attenuation rating (PAR), in place of the derating. No method is preferred and no
#   interval is stated, so one fit test of the model at hand is enough; one that was not passed is not.
# custom:
#   cite: NIOSH science policy update of January 2025
#   subject: worker
#   topic: protectors
#   severity: minor
#   evidence: [fit_test, protector_issue]
#   remedy: >-
#     Fit-test the worker with the protector at hand, change the model if it does not fit, and record the PAR.
package duty.fit_tested

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"because": common.refs([input.protection, input.protection.fit_test]),
	"facts": {"protector": input.protection.protector, "personal_attenuation_rating_db": input.protection.par_db},
}) if {
	in_program_now
	input.protection != null
	in_force
}

verdict := {
	"holds": false,
	"note": "no fit test of the protector at hand is on record",
} if {
	input.protection.fit_test == null
} else := {
	"holds": false,
	"on": input.protection.fit_failed.date,
	"note": "the latest fit test of the protector was not passed",
} if {
	input.protection.fit_failed != null
} else := {
	"holds": null,
	"on": input.protection.fit_test.date,
	"note": "the record of the latest fit test gives no personal attenuation rating",
	"missing": ["the personal attenuation rating (PAR)"],
} if {
	input.protection.par_db == null
} else := {
	"holds": true,
	"on": input.protection.fit_test.date,
}

not_owed contains "the records do not show exposure at or above the REL now" if not in_program_now

not_owed contains "no protector at hand, which is a finding of its own" if {
	in_program_now
	input.protection == null
}

not_owed contains "individual fit testing was not yet recommended" if not in_force

in_program_now if common.any_current(input.enrolled)

in_force if common.at(data.parameters.fit_tested_target, input.as_of) != null
